package casefile

import (
	"bytes"
	"errors"
	"fmt"
	"strings"
	"unicode/utf8"

	"github.com/goccy/go-yaml"
	"github.com/goccy/go-yaml/ast"
	"github.com/goccy/go-yaml/parser"
	"github.com/goccy/go-yaml/token"
)

// Bounds of a case file; the reader refuses more before it parses.
const (
	maxBytes   = 1 << 20
	maxLines   = 5000
	maxNesting = 32
	maxMarks   = 64 // unclosed brackets, or list marks in a row, before parsing
)

// place is a stretch of text in the file.
type place struct{ line, column, width int }

// shape of a value in the file.
type shape int

const (
	nothing shape = iota
	scalar
	mapping
	sequence
)

func (s shape) String() string {
	return [...]string{"nothing", "a single value", "a section (key: value)", "a list"}[s]
}

// value is one node of the file, reduced to what a case file may hold.
type value struct {
	shape  shape
	text   string // of a scalar
	quoted bool
	flow   bool // mapping in { }
	comma  bool // scalar that a comma cut in two between { and }
	at     place
	pairs  []pair
	items  []*value
	// bad marks a value that a finding was already made about; meant lists the
	// keys that misspelt keys stand for. Both keep one slip from making two findings.
	bad     bool
	setting bool // comes from the settings
	meant   map[string]bool
}

type pair struct {
	key   string
	at    place
	value *value
}

// get is the value of a key, nil when absent. It works on nil.
func (v *value) get(key string) *value {
	if p := v.pair(key); p != nil {
		return p.value
	}
	return nil
}

func (v *value) pair(key string) *pair {
	if v == nil {
		return nil
	}
	for i := range v.pairs {
		if v.pairs[i].key == key {
			return &v.pairs[i]
		}
	}
	return nil
}

// path follows keys joined by dots.
func (v *value) path(path string) *value {
	for _, key := range strings.Split(path, ".") {
		v = v.get(key)
	}
	return v
}

// parse turns the bytes into a tree. It returns nil after a finding that
// leaves nothing to read.
func (r *reader) parse(data []byte) *value {
	if !r.acceptable(data) {
		return nil
	}
	file, err := parser.ParseBytes(data, 0, parser.AllowDuplicateMapKey())
	if err != nil {
		r.syntax(err)
		return nil
	}
	body := r.oneDocument(file)
	if body == nil {
		return nil
	}
	root := r.node(body, 0)
	if r.tooDeep {
		return nil
	}
	if root == nil || root.shape != mapping {
		r.add("E-108", place{1, 1, 1}, "", Finding{Message: "the file does not begin with a key such as title:",
			Found: "other text", Expected: "title: ... on a line of its own"})
		return nil
	}
	return root
}

// acceptable checks what must hold before the parser sees the bytes.
func (r *reader) acceptable(data []byte) bool {
	if len(data) > maxBytes {
		r.add("E-101", place{1, 1, 1}, "", Finding{Message: "the file is larger than 1 MiB",
			Found: byteCount(len(data)), Expected: "at most " + byteCount(maxBytes)})
		return false
	}
	if len(r.lines) > maxLines {
		r.add("E-101", place{maxLines + 1, 1, 1}, "", Finding{Message: "the file has too many lines",
			Found: fmt.Sprintf("%d lines", len(r.lines)), Expected: fmt.Sprintf("at most %d", maxLines)})
		return false
	}
	for i, line := range r.lines {
		if column := firstBadRune(line); column > 0 {
			r.add("E-102", place{i + 1, column, 1}, "", Finding{Message: "the file holds a byte that is not text",
				Found: "a control character or broken UTF-8", Expected: "text in UTF-8"})
			return false
		}
	}
	if line, column := tooDeep(r.lines); line > 0 {
		r.add("E-107", place{line, column, 1}, "", tooDeepFinding)
		return false
	}
	if len(bytes.TrimSpace(data)) == 0 {
		r.add("E-108", place{1, 1, 1}, "", Finding{Message: "the file is empty", Found: "nothing", Expected: "title: ... and the other keys of a case"})
		return false
	}
	return true
}

var tooDeepFinding = Finding{Message: "brackets or lists are nested too deep", Found: "more than 32 levels", Expected: "at most 6 levels, as a case has"}

// firstBadRune is the column of the first character that is no text, or 0.
func firstBadRune(line string) int {
	column := 1
	for i := 0; i < len(line); column++ {
		c, n := utf8.DecodeRuneInString(line[i:])
		if c == utf8.RuneError && n <= 1 || unprintable(c) {
			return column
		}
		i += n
	}
	return 0
}

// unprintable characters could hide text from a reader or drive a terminal.
func unprintable(c rune) bool {
	switch {
	case c == '\t' || c == '\r' || c == '\n':
		return false
	case c < ' ' || c >= 0x7f && c < 0xa0:
		return true
	case c >= 0x202a && c <= 0x202e || c >= 0x2066 && c <= 0x2069: // bidirectional overrides
		return true
	}
	return c == 0x2028 || c == 0x2029 || c == 0x0085
}

// tooDeep finds nesting that no case file has, before the parser recurses into
// it. It counts without regard to quotes and comments.
func tooDeep(lines []string) (line, column int) {
	depth := 0
	for i, text := range lines {
		marks := 0
		before := ' '
		for j, c := range []rune(text) {
			switch {
			case c == '{' || c == '[':
				depth++
			case c == '}' || c == ']':
				depth = max(0, depth-1)
			case c == ' ' && strings.ContainsRune("-?:", before):
				marks++
			case c != ' ' && !strings.ContainsRune("-?:", c):
				marks = 0
			}
			if before = c; depth > maxMarks || marks > maxMarks {
				return i + 1, j + 1
			}
		}
	}
	return 0, 0
}

// syntax reports an error of the YAML parser at its token.
func (r *reader) syntax(err error) {
	at, message := place{1, 1, 1}, "the file is not valid YAML"
	var ye yaml.Error
	if errors.As(err, &ye) {
		message += ": " + ye.GetMessage()
		if t := ye.GetToken(); t != nil && t.Position != nil {
			at = place{t.Position.Line, t.Position.Column, max(1, utf8.RuneCountInString(firstLine(t.Value)))}
		}
	}
	r.add("E-103", at, "", Finding{Message: message, Found: "text that YAML cannot read", Expected: "key: value",
		Help: "quote text that holds a colon, a bracket or a # after a space; indent with spaces"})
}

func firstLine(s string) string {
	line, _, _ := strings.Cut(strings.TrimSpace(s), "\n")
	return line
}

func (r *reader) oneDocument(file *ast.File) ast.Node {
	var body ast.Node
	for _, d := range file.Docs {
		if d.Body == nil {
			continue
		}
		if _, directive := d.Body.(*ast.DirectiveNode); directive || body != nil {
			r.add("E-104", r.start(d.Body), "", Finding{Message: "the file holds more than one document",
				Found: "a second document or a directive", Expected: "one case in one file"})
			return nil
		}
		body = d.Body
	}
	if body == nil {
		r.add("E-108", place{1, 1, 1}, "", Finding{Message: "the file holds comments only", Found: "nothing", Expected: "title: ... and the other keys of a case"})
	}
	return body
}

// at is the place of a token.
func (r *reader) at(t *token.Token) place {
	if t == nil || t.Position == nil {
		return place{1, 1, 1}
	}
	text := firstLine(t.Origin)
	if text == "" {
		text = t.Value
	}
	return place{t.Position.Line, t.Position.Column, max(1, utf8.RuneCountInString(text))}
}

// node reduces a node of the parser. It returns nil after a finding.
func (r *reader) node(n ast.Node, depth int) *value {
	if depth > maxNesting {
		r.tooDeep = true
		r.add("E-107", r.at(n.GetToken()), "", tooDeepFinding)
		return nil
	}
	switch n := n.(type) {
	case *ast.MappingNode:
		return r.mapping(n, depth)
	case *ast.MappingValueNode:
		v := &value{shape: mapping, at: r.start(n)}
		r.addPair(v, n, map[string]place{}, depth)
		return v
	case *ast.SequenceNode:
		v := &value{shape: sequence, at: r.at(n.Start)}
		for _, item := range n.Values {
			v.items = append(v.items, r.nodeOr(item, depth))
		}
		return v
	case *ast.NullNode:
		return &value{shape: nothing, at: place{n.Token.Position.Line, n.Token.Position.Column, 1}}
	case *ast.LiteralNode:
		return &value{shape: scalar, text: strings.TrimSpace(n.Value.Value), quoted: true, at: r.at(n.Start)}
	case *ast.StringNode:
		quoted := n.Token.Type == token.SingleQuoteType || n.Token.Type == token.DoubleQuoteType
		return &value{shape: scalar, text: n.Value, quoted: quoted, at: r.at(n.Token)}
	case *ast.IntegerNode, *ast.FloatNode, *ast.BoolNode, *ast.InfinityNode, *ast.NanNode:
		return &value{shape: scalar, text: n.GetToken().Value, at: r.at(n.GetToken())}
	}
	r.foreign(n)
	return nil
}

// nodeOr is node with a bad value in place of nil.
func (r *reader) nodeOr(n ast.Node, depth int) *value {
	if v := r.node(n, depth+1); v != nil {
		return v
	}
	return &value{bad: true, at: r.at(n.GetToken())}
}

func (r *reader) mapping(n *ast.MappingNode, depth int) *value {
	v := &value{shape: mapping, flow: n.IsFlowStyle, at: r.start(n)}
	first := map[string]place{}
	for _, p := range n.Values {
		r.addPair(v, p, first, depth)
	}
	return v
}

// start is where a node begins; a mapping in block style begins at its first key.
func (r *reader) start(n ast.Node) place {
	switch n := n.(type) {
	case *ast.MappingNode:
		if !n.IsFlowStyle && len(n.Values) > 0 {
			return r.start(n.Values[0])
		}
	case *ast.MappingValueNode:
		return r.at(n.Key.GetToken())
	}
	return r.at(n.GetToken())
}

// addPair adds a key with its value; first holds the places of the keys so far.
func (r *reader) addPair(v *value, n *ast.MappingValueNode, first map[string]place, depth int) {
	key := n.Key.GetToken()
	if _, merge := n.Key.(*ast.MergeKeyNode); merge || key == nil {
		r.foreign(n.Key)
		return
	}
	switch n.Key.(type) {
	case *ast.StringNode, *ast.IntegerNode, *ast.FloatNode, *ast.BoolNode, *ast.NullNode, *ast.InfinityNode, *ast.NanNode:
	default:
		r.foreign(n.Key)
		return
	}
	at := r.at(key)
	if v.rejoin(key.Value, at, n.Value) {
		return
	}
	if was, twice := first[key.Value]; twice {
		r.add("E-203", at, key.Value, Finding{Message: "the key " + quote(key.Value) + " stands here twice",
			Found: quote(key.Value) + " again", Expected: "each key once", Help: "the first one is on " + lineWord(was.line)})
		return
	}
	first[key.Value] = at
	v.pairs = append(v.pairs, pair{key.Value, at, r.nodeOr(n.Value, depth)})
}

// rejoin puts together a number with a decimal comma, which YAML reads as a
// value and a further key between { and }, so that it gets one finding.
func (v *value) rejoin(key string, at place, node ast.Node) bool {
	_, empty := node.(*ast.NullNode)
	if !v.flow || !empty || len(v.pairs) == 0 || !startsWithDigit(key) {
		return false
	}
	last := v.pairs[len(v.pairs)-1].value
	digits := strings.TrimLeft(last.text, "+-\u2212")
	if last.shape != scalar || last.quoted || digits == "" || strings.Trim(digits, "0123456789") != "" {
		return false
	}
	if at.line != last.at.line || at.column != last.at.column+last.at.width+1 {
		return false
	}
	last.text += "," + key
	last.at.width += 1 + at.width
	last.comma = true
	return true
}

// foreign reports YAML that a case file does not use.
func (r *reader) foreign(n ast.Node) {
	at := r.at(n.GetToken())
	switch n.(type) {
	case *ast.AnchorNode, *ast.AliasNode, *ast.MergeKeyNode:
		r.add("E-105", at, "", Finding{Message: "anchors, aliases and merge keys are not read", Found: quote(n.GetToken().Value),
			Expected: "the value itself", Help: "load cases change single inputs without repeating the rest"})
	case *ast.TagNode:
		r.add("E-106", at, "", Finding{Message: "tags are not read", Found: quote(n.GetToken().Value), Expected: "the value itself"})
	default:
		r.add("E-103", at, "", Finding{Message: "the file uses YAML that a case file does not need", Found: quote(n.GetToken().Value), Expected: "key: value"})
	}
}
