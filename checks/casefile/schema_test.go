package casefile

import (
	"bytes"
	"encoding/json"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/goccy/go-yaml"
	"github.com/santhosh-tekuri/jsonschema/v6"
)

func compiled(t *testing.T) *jsonschema.Schema {
	t.Helper()
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(Schema()))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	c.UseLoader(refuseToLoad{})
	if err := c.AddResource(SchemaID, doc); err != nil {
		t.Fatal(err)
	}
	s, err := c.Compile(SchemaID)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// refuseToLoad fails when the schema refers to anything outside itself.
type refuseToLoad struct{}

func (refuseToLoad) Load(url string) (any, error) { return nil, os.ErrNotExist }

// instance is a case file as an editor shows it to the schema.
func instance(t *testing.T, data []byte) any {
	t.Helper()
	var v any
	if err := yaml.Unmarshal(data, &v); err != nil {
		t.Fatal(err)
	}
	text, err := json.Marshal(v)
	if err != nil {
		t.Fatal(err)
	}
	in, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
	if err != nil {
		t.Fatal(err)
	}
	return in
}

func validFiles(t *testing.T) []string {
	t.Helper()
	own, err := filepath.Glob("testdata/*.yaml")
	if err != nil {
		t.Fatal(err)
	}
	var all []string
	for _, f := range own {
		if !strings.Contains(f, "mistakes") {
			all = append(all, f)
		}
	}
	if len(all) < 3 {
		t.Fatalf("only %d valid files", len(all))
	}
	return all
}

func TestSchemaAcceptsValidFiles(t *testing.T) {
	s := compiled(t)
	for _, file := range validFiles(t) {
		if err := s.Validate(instance(t, read(t, file))); err != nil {
			t.Errorf("%s: %v", file, err)
		}
	}
}

// Codes about form alone are refused by the schema too; the others need more
// than a schema can say.
func TestSchemaRefusesMistakesOfForm(t *testing.T) {
	s := compiled(t)
	for _, code := range []string{"E-201", "E-202", "E-204", "E-205", "E-206", "E-207", "E-302", "E-303", "E-304", "E-305", "E-310", "E-311", "E-313"} {
		data := []byte(made[code])
		if len(data) == 0 {
			data = read(t, filepath.Join("testdata", "codes", code+".yaml"))
		}
		if err := s.Validate(instance(t, data)); err == nil {
			t.Errorf("the schema accepts the file of %s", code)
		}
	}
	if err := s.Validate(instance(t, read(t, "testdata/ten-mistakes.yaml"))); err == nil {
		t.Error("the schema accepts the ten mistakes")
	}
}

// Warnings and what only shows when values meet pass the schema.
func TestSchemaLeavesTheRestToTheReader(t *testing.T) {
	s := compiled(t)
	for _, code := range []string{"E-401", "E-402", "E-403", "E-405", "E-406", "E-407", "E-408", "E-409", "E-501", "E-502", "E-503", "E-504", "E-505", "E-506"} {
		if err := s.Validate(instance(t, read(t, filepath.Join("testdata", "codes", code+".yaml")))); err != nil {
			t.Errorf("%s: %v", code, err)
		}
	}
}

// Every property has a description and an example; nothing is a choice between
// forms; nothing is fetched; every default and example of a quantity matches its pattern.
func TestSchemaIsComplete(t *testing.T) {
	var root map[string]any
	if err := json.Unmarshal(Schema(), &root); err != nil {
		t.Fatal(err)
	}
	properties := 0
	var walk func(path string, s map[string]any)
	walk = func(path string, s map[string]any) {
		properties++
		for _, word := range []string{"oneOf", "anyOf", "allOf", "$ref", "not", "if"} {
			if _, ok := s[word]; ok {
				t.Errorf("%s uses %s", path, word)
			}
		}
		if d, _ := s["description"].(string); len(d) < 5 {
			t.Errorf("%s has no description", path)
		}
		if e, _ := s["examples"].([]any); len(e) == 0 || e[0] == "" {
			t.Errorf("%s has no example", path)
		} else if p, ok := s["pattern"].(string); ok && !regexp.MustCompile(p).MatchString(e[0].(string)) {
			t.Errorf("%s: example %q does not match %s", path, e[0], p)
		}
		if d, ok := s["default"].(string); ok && s["pattern"] != nil && !regexp.MustCompile(s["pattern"].(string)).MatchString(d) {
			t.Errorf("%s: default %q does not match", path, d)
		}
		if s["type"] == "object" && s["additionalProperties"] != false {
			t.Errorf("%s takes any key", path)
		}
		if p, ok := s["properties"].(map[string]any); ok {
			for key, v := range p {
				walk(path+"."+key, v.(map[string]any))
			}
		}
		if items, ok := s["items"].(map[string]any); ok {
			walk(path+"[]", items)
		}
	}
	walk("case", root)
	if properties < 100 {
		t.Errorf("only %d properties", properties)
	}
}

// Every input of the documentation table says what it is.
func TestInputsAreDescribed(t *testing.T) {
	defaults := 0
	for _, d := range Inputs() {
		if len(d.Help) < 5 || !strings.HasSuffix(d.Help, ".") {
			t.Errorf("%s: help %q is no sentence", d.Path, d.Help)
		}
		if d.Default != "" {
			defaults++
			if d.Source == "" {
				t.Errorf("%s: default without a source", d.Path)
			}
		}
		if d.Form == "quantity" && (d.Kind == "" || d.Range == "" || d.Example == "") {
			t.Errorf("%s: incomplete quantity %+v", d.Path, d)
		}
	}
	if defaults < 12 {
		t.Errorf("only %d defaults", defaults)
	}
}

// Every example of the description can be read where it stands.
func TestExamplesRead(t *testing.T) {
	for _, in := range leaves(description) {
		r := &reader{seen: map[string]bool{}, faces: allFaces}
		for _, typed := range []string{in.example, in.usual} {
			if typed != "" {
				r.check(&value{shape: scalar, text: typed, at: place{1, 1, 1}}, in, in.key)
			}
		}
		if in.example == "" || len(r.findings) > 0 {
			t.Errorf("%s: example %q: %s", in.key, in.example, formatted(r.findings))
		}
	}
}

func leaves(in *input) (all []*input) {
	for _, p := range in.parts {
		all = append(all, leaves(p)...)
	}
	if in.each != nil {
		return append(all, leaves(in.each)...)
	}
	if in.parts == nil {
		all = append(all, in)
	}
	return all
}
