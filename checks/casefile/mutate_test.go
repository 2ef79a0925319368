package casefile

import (
	"encoding/json"
	"slices"
	"strings"
	"testing"

	"github.com/goccy/go-yaml/ast"
	"github.com/goccy/go-yaml/parser"
	"pgregory.net/rapid"
)

// spot is a key in a file: its line, column and letters.
type spot struct {
	line, column int
	key          string
}

type spots []spot

func (s *spots) Visit(n ast.Node) ast.Visitor {
	if p, ok := n.(*ast.MappingValueNode); ok {
		*s = append(*s, spotOf(p.Key))
	}
	return s
}

func spotOf(n ast.Node) spot {
	t := n.GetToken()
	return spot{t.Position.Line, t.Position.Column, strings.TrimSpace(t.Origin)}
}

// values is like spots for the values that stand on one line.
type values []spot

func (v *values) Visit(n ast.Node) ast.Visitor {
	if p, ok := n.(*ast.MappingValueNode); ok {
		switch p.Value.(type) {
		case *ast.StringNode, *ast.IntegerNode, *ast.FloatNode:
			*v = append(*v, spotOf(p.Value))
		}
	}
	return v
}

func bodyNode(t *testing.T, data []byte) ast.Node {
	t.Helper()
	file, err := parser.ParseBytes(data, 0)
	if err != nil {
		t.Fatal(err)
	}
	return file.Docs[0].Body
}

func spotsOf(t *testing.T, data []byte) (all spots) {
	t.Helper()
	ast.Walk(&all, bodyNode(t, data))
	return all
}

func valuesOf(t *testing.T, data []byte) (all values) {
	t.Helper()
	ast.Walk(&all, bodyNode(t, data))
	return all
}

// replace writes another key at a spot.
func (s spot) replace(text, key string) string {
	lines := strings.Split(text, "\n")
	r := []rune(lines[s.line-1])
	lines[s.line-1] = string(r[:s.column-1]) + key + string(r[s.column-1+len([]rune(s.key)):])
	return strings.Join(lines, "\n")
}

// Whatever key of a valid file is misspelt, the file is refused with a finding
// on that line, or the new key is itself a right one and means something else.
func TestNoKeyIsIgnored(t *testing.T) {
	for _, file := range validFiles(t) {
		data := read(t, file)
		all := spotsOf(t, data)
		before, _ := Read(file, data, Defaults{})
		rapid.Check(t, func(t *rapid.T) {
			s := all[rapid.IntRange(0, len(all)-1).Draw(t, "key")]
			key := mutated(t, s.key)
			f, findings := Read(file, []byte(s.replace(string(data), key)), Defaults{})
			if f == nil && len(findings) > 0 {
				return
			}
			if key == s.key || f != nil && asJSON(t, f) != asJSON(t, before) {
				return
			}
			t.Fatalf("%s line %d: %q instead of %q is ignored", file, s.line, key, s.key)
		})
	}
}

// asJSON is what a file says, whatever its bytes.
func asJSON(t *rapid.T, f *File) string {
	b, err := json.Marshal([]any{f.Cases, f.Inputs})
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

// mutated changes one letter of a key.
func mutated(t *rapid.T, key string) string {
	r := []rune(key)
	i := rapid.IntRange(0, len(r)-1).Draw(t, "at")
	letter := rapid.SampledFrom([]rune("abcdefghijklmnopqrstuvwxyz")).Draw(t, "letter")
	switch rapid.IntRange(0, 3).Draw(t, "how") {
	case 0:
		return string(r[:i]) + string(r[i+1:]) + "x"
	case 1:
		return string(r[:i]) + string(letter) + string(r[i:])
	case 2:
		return string(r[:i]) + string(letter) + string(r[i+1:])
	}
	return strings.ToUpper(string(r[:1])) + string(r[1:])
}

// Any bytes, and any damage to a valid file, give findings, never a panic; a
// file without errors has cases, and every finding is complete.
func TestReadNeverPanics(t *testing.T) {
	var texts [][]byte
	for _, file := range validFiles(t) {
		texts = append(texts, read(t, file))
	}
	rapid.Check(t, func(rt *rapid.T) {
		data := rapid.SliceOf(rapid.Byte()).Draw(rt, "bytes")
		if rapid.Bool().Draw(rt, "damage") {
			data = damaged(rt, rapid.SampledFrom(texts).Draw(rt, "file"))
		}
		f, findings := Read("x.yaml", data, Defaults{})
		if (f == nil) != HasErrors(findings) {
			rt.Fatalf("file %v, findings:\n%s", f != nil, formatted(findings))
		}
		if f != nil && len(f.Cases) == 0 {
			rt.Fatal("no case")
		}
		for _, one := range findings {
			if one.Line < 1 || one.Column < 1 || one.Width < 1 || one.Message == "" || one.Expected == "" {
				rt.Fatalf("incomplete finding %+v", one)
			}
			if _, ok := Explain(one.Code); !ok {
				rt.Fatalf("code %s", one.Code)
			}
		}
	})
}

// damaged cuts a stretch out of a text or puts one in.
func damaged(t *rapid.T, text []byte) []byte {
	i := rapid.IntRange(0, len(text)).Draw(t, "from")
	j := min(len(text), i+rapid.IntRange(0, 20).Draw(t, "length"))
	in := rapid.SampledFrom([]string{"", ":", "\n", "  ", "{", "]", "- ", "'", "#", "&a ", "*a", "0", "null", ", x: 1", "\xff", "? ", "| ", "!!int ", "---\n", "°"}).Draw(t, "in")
	return append(append(append([]byte{}, text[:i]...), in...), text[j:]...)
}

// What the reader takes, the schema takes, so that an editor never underlines a
// file that is right; and mistakes of form are refused by both.
func TestSchemaAndReaderAgree(t *testing.T) {
	schema := compiled(t)
	taken := 0
	for _, file := range validFiles(t) {
		data := read(t, file)
		keys, vals := spotsOf(t, data), valuesOf(t, data)
		rapid.Check(t, func(rt *rapid.T) {
			text := string(data)
			if rapid.IntRange(0, 3).Draw(rt, "what") == 0 {
				s := rapid.SampledFrom([]spot(keys)).Draw(rt, "key")
				text = s.replace(text, rapid.SampledFrom([]spot(keys)).Draw(rt, "other key").key)
			} else {
				s := rapid.SampledFrom([]spot(vals)).Draw(rt, "value")
				text = s.replace(text, rapid.SampledFrom(typical).Draw(rt, "other value"))
			}
			f, findings := Read(file, []byte(text), Defaults{})
			if f == nil {
				if !slices.ContainsFunc(findings, ofYAML) && slices.ContainsFunc(findings, ofForm) && schema.Validate(instance(t, []byte(text))) == nil {
					rt.Fatalf("the schema takes what the reader refuses:\n%s%s", text, formatted(findings))
				}
				return
			}
			taken++
			if err := schema.Validate(instance(t, []byte(text))); err != nil {
				rt.Fatalf("the schema refuses what the reader takes: %v\n%s", err, text)
			}
		})
	}
	if taken < 20 {
		t.Errorf("only %d files were taken", taken)
	}
}

// ofForm reports findings that the schema can make too: keys, shapes, words.
// Units inside expressions, names of catalogues, faces that depend on the
// axis, and what depends on several values are beyond it.
func ofForm(f Finding) bool {
	return slices.Contains([]string{"E-201", "E-202", "E-205", "E-206", "E-207", "E-304", "E-310", "E-311"}, f.Code)
}

// ofYAML reports findings after which there is no document to show the schema.
func ofYAML(f Finding) bool { return f.Code < "E-2" || f.Code == "E-203" }

// typical values that fit in some places.
var typical = []string{"40 °C", "-5 °C", "\"−15 °C\"", "104 degF", "40 deg C", "300 K", "540 °R", "0.5", "1", "0", "\"0.7\"", "50 %", "600 mm", "0.6 m", "24 in", "1.5e2 mm",
	"12 345 mm", "18 Δ°F", "5 K", "5 delta degF", "250 W", "0.25 kW", "850 Btu/h", "700 W/m²", "700 W/m^2", "101.3 kPa", "14.7 psi", "10 s", "1 min", "45°", "45 deg",
	"5 W/(m·K)", "0.3 Btu·in/(h·ft²·°F)", "SI", "US", "free", "wall", "front", "top", "horizontal", "vertical", "any face", "inside air", "none", "~", "true", "2026", "0012", "[]", "{}", "' '", "text"}
