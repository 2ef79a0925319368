package casefile

// Severity of a finding.
type Severity int

// Errors stop the run; warnings are printed and carried into the note.
const (
	Error Severity = iota
	Warning
)

// Finding is one problem of the input.
type Finding struct {
	Code     string // "E-104", stable; see Explain
	Severity Severity
	File     string
	Line     int // 1-based
	Column   int // 1-based, in characters
	Width    int // characters to underline, at least 1
	Source   string
	Path     string // "body.box.width"
	Message  string // a sentence that stands alone
	Found    string
	Expected string
	Nearest  string // the nearest right word, or ""
	Help     string // one more sentence, or ""
}

// File is a case file that was read without errors.
type File struct {
	Name     string
	SHA256   string // of the bytes read, hex
	Text     []byte
	Cases    []Case // one per load case, in file order; at least one
	Inputs   []Input
	Warnings []Finding
}
