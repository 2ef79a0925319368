package casefile

import (
	"encoding/json"
	"strings"

	"stillair/checks/unit"
)

// Description is one input as the documentation shows it.
type Description struct {
	Path     string   `json:"path"` // "body.box.width"; [] stands for the entries of a list, <face> for a name
	Form     string   `json:"form"` // "text", "word", "quantity", "section", "by name", "list"
	Kind     string   `json:"kind,omitempty"`
	Help     string   `json:"help"`
	Required bool     `json:"required"`
	Default  string   `json:"default,omitempty"`
	Source   string   `json:"source,omitempty"` // of the default
	Range    string   `json:"range,omitempty"`
	Words    []string `json:"words,omitempty"`
	Example  string   `json:"example,omitempty"`
}

var formNames = map[form]string{text: "text", word: "word", quantity: "quantity", section: "section", byName: "by name", list: "list"}

// Inputs lists every input of the case file in the order of the description.
func Inputs() []Description { return describe(nil, description, "") }

func describe(all []Description, in *input, path string) []Description {
	if path != "" {
		all = append(all, in.described(path))
	}
	for _, p := range in.parts {
		all = describe(all, p, join(path, p.key))
	}
	switch in.form {
	case list:
		all = describe(all, in.each, path+"[]")
	case byName:
		all = describe(all, in.each, path+".<face>")
	}
	return all
}

func (in *input) described(path string) Description {
	d := Description{Path: path, Form: formNames[in.form], Help: in.help, Required: in.required, Default: in.usual, Source: in.why, Example: in.example}
	if in.form == quantity {
		d.Kind = in.kind.Name()
	}
	if in.span != nil {
		d.Range = in.span.text
	}
	if in.words != nil {
		d.Words = in.words.words()
	}
	return d
}

// SchemaID names the schema of the case file.
const SchemaID = "urn:stillair:case:1"

// Schema is the JSON Schema (draft 2020-12) of the case file. It stands alone:
// nothing in it is fetched.
func Schema() []byte {
	s := schemaOf(description)
	s["$schema"] = "https://json-schema.org/draft/2020-12/schema"
	s["$id"] = SchemaID
	s["title"] = "stillair case file"
	out, err := json.MarshalIndent(s, "", "  ")
	if err != nil {
		return nil // a tree of strings, numbers and maps always marshals
	}
	return append(out, '\n')
}

type object = map[string]any

func schemaOf(in *input) object {
	s := object{"description": in.hover(), "examples": []any{exampleOf(in)}}
	switch in.form {
	case section, byName:
		in.sectionSchema(s)
	case list:
		s["type"], s["items"], s["maxItems"] = "array", schemaOf(in.each), maxItems
		if in.key != layers.key {
			s["minItems"] = 1
		}
	case quantity:
		in.quantitySchema(s)
	case word:
		in.wordSchema(s)
	case text:
		in.textSchema(s)
	}
	if in.usual != "" {
		s["default"] = in.usual
	}
	return s
}

func (in *input) sectionSchema(s object) {
	keys := object{}
	for _, key := range in.keys() {
		keys[key] = schemaOf(in.child(key))
	}
	s["type"], s["additionalProperties"], s["properties"], s["minProperties"] = "object", false, keys, 1
	if in.key == body.key {
		s["maxProperties"] = 1
	}
	if must := in.mustHave(); len(must) > 0 {
		s["required"] = must
	}
}

// hover is what an editor shows: the sentence, the unit, the range, the default.
func (in *input) hover() string {
	parts := []string{in.help}
	switch {
	case in.form == quantity && in.kind == unit.Ratio:
		parts = append(parts, "A plain number, such as "+in.example+".")
	case in.form == quantity:
		parts = append(parts, "A quantity with its unit, such as "+in.example+".")
	}
	if in.span != nil {
		parts = append(parts, "Range: "+in.span.text+".")
	}
	if in.usual != "" {
		parts = append(parts, "Default: "+in.usual+" ("+in.why+").")
	}
	return strings.Join(parts, " ")
}

// mustHave lists the keys a section needs in every file. Air is left out: it
// may come from a setting or from the load cases.
func (in *input) mustHave() (keys []string) {
	for _, p := range in.parts {
		if p.required && p != surroundings && p != air {
			keys = append(keys, p.key)
		}
	}
	return keys
}

// quantitySchema is one string with a pattern. YAML reads a bare 0.85 as a
// number, so plain numbers may be numbers.
func (in *input) quantitySchema(s object) {
	s["type"], s["pattern"], s["maxLength"] = "string", unit.Pattern(in.kind), unit.MaxText
	if in.kind == unit.Ratio || in.kind == unit.Percent {
		s["type"] = []string{"string", "number"}
		s["minimum"], s["maximum"] = in.span.low, in.span.high
		if in.span.openLow {
			delete(s, "minimum")
			s["exclusiveMinimum"] = in.span.low
		}
	}
}

// wordSchema lists the words of a fixed list. Names of the catalogues can be
// typed short, so they are only offered as examples.
func (in *input) wordSchema(s object) {
	s["type"] = "string"
	if in.words.known == nil {
		s["enum"] = in.words.words()
		return
	}
	offers := []any{in.example}
	for _, w := range in.words.words() {
		if w != in.example {
			offers = append(offers, w)
		}
	}
	s["examples"] = offers
}

// textSchema takes what YAML makes of unquoted text: a tag 0012 is a number.
func (in *input) textSchema(s object) {
	s["type"], s["maxLength"] = []string{"string", "number", "boolean", "null"}, maxText
	if in.required {
		s["type"], s["pattern"] = []string{"string", "number", "boolean"}, `\S`
	}
}

func exampleOf(in *input) any {
	switch in.form {
	case section:
		if in.key == body.key {
			return object{"box": exampleOf(in.part("box"))}
		}
		return sectionExample(in)
	case byName:
		return object{in.names[0]: exampleOf(in.each)}
	case list:
		return []any{exampleOf(in.each)}
	}
	return in.example
}

// sectionExample shows what is required, or the first key.
func sectionExample(in *input) object {
	e := object{}
	for _, p := range in.parts {
		if p.required {
			e[p.key] = exampleOf(p)
		}
	}
	if len(e) == 0 {
		e[in.parts[0].key] = exampleOf(in.parts[0])
	}
	return e
}
