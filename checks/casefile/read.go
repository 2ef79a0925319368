package casefile

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"slices"
	"strings"
)

// Defaults are the settings that stand in for inputs a file leaves out. They
// are typed texts; empty ones do not count.
type Defaults struct {
	Units string // "SI" or "US"
	Owner string // legal owner of the note
	Air   string
	// Radiant counts only when Air does: a file that types its own air
	// temperature is not given the surroundings of another place.
	Radiant  string
	Altitude string
}

// A hopeless list of findings is cut: maxKept are kept to be sorted,
// maxFindings are shown.
const (
	maxFindings = 100
	maxKept     = 1000
)

// reader gathers what is wrong with one file.
type reader struct {
	name     string
	lines    []string
	findings []Finding
	seen     map[string]bool
	dropped  int      // findings beyond maxKept
	tooDeep  bool     // the tree was cut off
	faces    []string // faces of the body of the load case being checked
}

// Read reads a case file. The findings are sorted by place; when one of them
// is an Error the file is nil. Warnings are also kept in the file.
func Read(name string, data []byte, d Defaults) (*File, []Finding) {
	bom := strings.TrimPrefix(string(data), "\ufeff")
	r := &reader{name: name, lines: splitLines(bom), seen: map[string]bool{}, faces: allFaces}
	root := r.parse([]byte(bom))
	if root == nil {
		return nil, r.sorted()
	}
	f := &File{Name: name, Text: slices.Clone(data), SHA256: digest(data)}
	r.read(root, d, f)
	all := r.sorted()
	if HasErrors(all) {
		return nil, all
	}
	f.Warnings = all
	return f, all
}

// HasErrors reports whether one of the findings is an Error.
func HasErrors(all []Finding) bool {
	return slices.ContainsFunc(all, func(f Finding) bool { return f.Severity == Error })
}

func digest(data []byte) string {
	sum := sha256.Sum256(data)
	return hex.EncodeToString(sum[:])
}

func splitLines(s string) []string {
	return strings.Split(strings.ReplaceAll(strings.ReplaceAll(s, "\r\n", "\n"), "\r", "\n"), "\n")
}

// read checks the case and each load, and makes a Case of each.
func (r *reader) read(root *value, d Defaults, f *File) {
	kind, axis := bodyOf(root)
	r.faces = facesOf(kind, axis)
	r.check(root, description, "")
	r.checkBodyKinds(root)
	base := r.withSettings(root, d)
	loads := root.get("loads")
	described := newBuilder(r, base)
	described.build()
	if loads == nil || loads.bad || loads.shape != sequence || len(loads.items) == 0 {
		described.c.Load = Load{Name: AsDescribed}
		f.Cases = []Case{described.c}
		r.tell(described.found)
	} else {
		f.Cases = r.loads(base, loads, described)
	}
	f.Inputs = needed(described.inputs, f.Cases)
	r.condensation(f.Cases, root)
}

// needed leaves out the default uncertainties that no load case makes use of.
func needed(inputs []Input, cases []Case) []Input {
	unused := map[string]bool{}
	for key, uses := range map[string]func(Case) bool{
		"heat":         func(c Case) bool { return c.Heat.Set },
		"contents":     func(c Case) bool { return c.Contents.Set },
		"sun":          func(c Case) bool { return len(c.Surroundings.Sun) > 0 },
		"absorptance":  func(c Case) bool { return len(c.Surroundings.Sun) > 0 },
		"inside":       func(c Case) bool { return c.Body.Kind == "box" },
		"upper zone":   func(c Case) bool { return c.Body.Kind == "box" },
		"humidity":     func(c Case) bool { return c.Surroundings.Humidity.Set },
		"conductivity": func(c Case) bool { return c.Body.Wall != nil || len(c.Body.Layers) > 0 },
		"thickness":    func(c Case) bool { return c.Body.Wall != nil || len(c.Body.Layers) > 0 },
	} {
		unused["uncertainty."+key] = !slices.ContainsFunc(cases, uses)
	}
	return slices.DeleteFunc(inputs, func(in Input) bool { return in.Assumption && unused[in.Path] })
}

// AsDescribed names the load case of a file without loads.
const AsDescribed = "as described"

// longestExcerpt is the longest source line, in bytes, that a finding repeats.
const longestExcerpt = 1000

// add makes a finding with its place and source line, once.
func (r *reader) add(code string, at place, path string, f Finding) {
	f.Code, f.Severity = code, severityOf(code)
	f.File, f.Path = r.name, path
	f.Line, f.Column, f.Width = max(1, at.line), max(1, at.column), max(1, at.width)
	if f.Line <= len(r.lines) && len(r.lines[f.Line-1]) <= longestExcerpt {
		f.Source = r.lines[f.Line-1]
	}
	id := fmt.Sprint(f.Code, f.Line, f.Column, f.Path, f.Found)
	if r.seen[id] {
		return
	}
	if len(r.findings) >= maxKept && f.Severity == Warning || len(r.findings) >= 2*maxKept {
		r.dropped++
		return
	}
	r.seen[id] = true
	r.findings = append(r.findings, f)
}

func (r *reader) sorted() []Finding {
	slices.SortStableFunc(r.findings, func(a, b Finding) int {
		if a.Line != b.Line {
			return a.Line - b.Line
		}
		return a.Column - b.Column
	})
	if len(r.findings) > maxFindings {
		rest := len(r.findings) - maxFindings + r.dropped
		last := r.findings[maxFindings-1]
		severity := Warning
		if HasErrors(r.findings) {
			severity = Error
		}
		r.findings = append(r.findings[:maxFindings], Finding{Code: "E-199", Severity: severity, File: r.name, Line: last.Line, Column: 1, Width: 1, Source: last.Source,
			Message: fmt.Sprintf("%d more findings are not shown", rest), Found: "very many findings", Expected: "a case file"})
	}
	return r.findings
}

// bodyOf is the kind of body of a tree and its axis.
func bodyOf(root *value) (kind, axis string) {
	for _, k := range bodyKinds {
		b := root.get("body").get(k)
		if b == nil {
			continue
		}
		if in := body.part(k).part("axis"); in != nil {
			axis = in.usual
		}
		if a := b.get("axis"); a != nil && a.shape == scalar {
			axis = a.text
		}
		return k, axis
	}
	return "", ""
}

// withSettings puts settings under a case: what the case types stays.
func (r *reader) withSettings(root *value, d Defaults) *value {
	under := &value{shape: mapping}
	around := &value{shape: mapping}
	typed := root.get("surroundings")
	r.setting(around, air, d.Air)
	if typed.get("air") == nil && d.Air != "" {
		r.setting(around, radiant, d.Radiant)
	}
	if typed.get("pressure") == nil {
		r.setting(around, altitude, d.Altitude)
	}
	if len(around.pairs) > 0 {
		under.pairs = append(under.pairs, pair{key: "surroundings", value: around})
	}
	r.setting(under, description.part("units"), d.Units)
	if d.Owner != "" {
		owner := &value{shape: mapping}
		r.setting(owner, note.part("owner"), d.Owner)
		under.pairs = append(under.pairs, pair{key: "note", value: owner})
	}
	return merge(under, root, "")
}

// setting adds one setting to a section after checking it like typed text.
func (r *reader) setting(to *value, in *input, typed string) {
	if typed == "" {
		return
	}
	probe := &reader{name: "settings", lines: []string{in.key + ": " + typed}, seen: map[string]bool{}}
	v := &value{shape: scalar, text: typed, at: place{1, len(in.key) + 3, len([]rune(typed))}}
	probe.check(v, in, in.key)
	for _, f := range probe.findings {
		if f.Severity == Error {
			f.Code, f.Help = "E-415", "change the setting or type the value in the case"
		}
		r.findings = append(r.findings, f)
	}
	if !HasErrors(probe.findings) {
		to.pairs = append(to.pairs, pair{key: in.key, value: &value{shape: scalar, text: typed, setting: true}})
	}
}
