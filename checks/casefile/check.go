package casefile

import (
	"errors"
	"fmt"
	"slices"
	"strings"
	"sync"
	"unicode/utf8"

	"stillair/checks/unit"
	"stillair/radiation/catalogue"
)

// Bounds of texts and lists.
const (
	maxText  = 4000 // characters
	maxItems = 200
)

// check walks a value along its description and reports every slip of form:
// keys, shapes, units, ranges, words. What depends on other values comes later.
func (r *reader) check(v *value, in *input, path string) {
	switch {
	case v.bad:
		return
	case v.shape == nothing && in.form == text && !in.required:
		return
	case v.shape == nothing:
		r.empty(v, in, path)
		return
	case v.shape != shapeOf(in.form) || v.comma && in.form != quantity:
		r.wrongShape(v, in, path)
		return
	}
	switch in.form {
	case section, byName:
		r.checkKeys(v, in, path)
	case list:
		r.checkItems(v, in, path)
	case quantity:
		r.checkQuantity(v, in, path)
	case word:
		r.checkWord(v, in, path)
	case text:
		r.checkText(v, in, path)
	}
}

func shapeOf(f form) shape {
	switch f {
	case section, byName:
		return mapping
	case list:
		return sequence
	}
	return scalar
}

func join(path, key string) string {
	if path == "" {
		return key
	}
	return path + "." + key
}

func (r *reader) bad(v *value, code, path string, f Finding) {
	v.bad = true
	r.add(code, v.at, path, f)
}

func (r *reader) empty(v *value, in *input, path string) {
	r.bad(v, "E-205", path, Finding{Message: path + " has no value", Found: "nothing", Expected: in.expected(),
		Help: "give it a value or remove the key"})
}

// expected says in words what may stand behind a key.
func (in *input) expected() string {
	switch in.form {
	case quantity:
		return in.kind.Name() + ", such as " + in.example
	case word:
		return in.words.expected(in.example)
	case section, byName:
		return "a section with " + oneOf(in.keys())
	case list:
		return "a list, each entry after a -"
	}
	if in.example != "" {
		return "text, such as " + in.example
	}
	return "text"
}

// expected lists a few words, or points to a catalogue.
func (v *vocabulary) expected(example string) string {
	words := v.words()
	if v.known == nil || len(words) <= 8 {
		return "one of " + oneOf(words)
	}
	return fmt.Sprintf("a name or id of the %s table, such as %s", v.noun, example)
}

func (r *reader) wrongShape(v *value, in *input, path string) {
	found := v.shape.String()
	if v.shape == scalar {
		found = quote(v.text)
	}
	where := path
	if where == "" {
		where = "the file"
	}
	f := Finding{Message: where + " has the wrong form", Found: found, Expected: in.expected()}
	if v.comma {
		f.Help = needsQuotes
	}
	r.bad(v, "E-206", path, f)
}

func (r *reader) checkKeys(v *value, in *input, path string) {
	if len(v.pairs) == 0 {
		r.empty(v, in, path)
		return
	}
	v.pairs = slices.DeleteFunc(v.pairs, func(p pair) bool {
		part := in.child(p.key)
		if part == nil || in.form == byName && !slices.Contains(r.faces, p.key) {
			r.unknownKey(v, in, p, path)
			return true
		}
		r.check(p.value, part, join(path, p.key))
		return false
	})
}

const needsQuotes = "a text that holds a comma needs quotes between { and }"

// unknownKey reports a key that has no place here.
func (r *reader) unknownKey(v *value, in *input, p pair, path string) {
	keys := in.keys()
	code, noun := "E-201", "key"
	switch {
	case in.form == byName:
		code, noun = "E-305", "face"
		keys = common(keys, r.faces)
	case in == methods:
		code, noun = "E-310", "situation"
	}
	f := Finding{Found: quote(p.key), Expected: "one of " + oneOf(keys), Nearest: nearest(p.key, keys),
		Message: fmt.Sprintf("the %s %s is not known %s", noun, quote(p.key), whereWord(path))}
	if in.form == byName {
		f.Nearest = nearestFace(p.key, keys)
	}
	if owners := owners(p.key); code == "E-201" && len(owners) > 0 {
		code = "E-202"
		f.Message = fmt.Sprintf("the key %s does not belong %s", quote(p.key), whereWord(path))
		f.Help = "it belongs in " + oneOf(owners)
		if path == "" {
			f.Nearest = v.moved(p, owners)
		}
	}
	if strings.HasPrefix(path, "loads[") && p.key == "surroundings" {
		f.Help = "a load case names air, radiant, sees, sun, altitude, pressure and humidity directly"
	}
	if v.flow && p.value.shape == nothing && !p.value.bad {
		f.Help = needsQuotes
	}
	v.means(f.Nearest)
	r.add(code, p.at, join(path, p.key), f)
}

// means notes the key that a wrong one stands for.
func (v *value) means(key string) {
	if v.meant == nil {
		v.meant = map[string]bool{}
	}
	v.meant[key] = true
}

// moved writes a key of the top level in the section it belongs in, when that
// is the only one beside uncertainty; what is then missing there is not told
// again.
func (v *value) moved(p pair, owners []string) string {
	owners = slices.DeleteFunc(slices.Clone(owners), func(o string) bool { return o == uncertainty.key })
	if len(owners) != 1 || !slices.Contains(description.keys(), owners[0]) {
		return ""
	}
	owner := owners[0]
	if section := v.get(owner); section != nil {
		section.means(p.key)
	} else {
		v.means(owner)
	}
	if p.value.shape != scalar {
		return owner + ": {" + p.key + ": ...}"
	}
	return owner + ": {" + p.key + ": " + p.value.text + "}"
}

func whereWord(path string) string {
	if path == "" {
		return "at the top level"
	}
	return "in " + path
}

func common(a, b []string) (both []string) {
	for _, x := range a {
		if slices.Contains(b, x) {
			both = append(both, x)
		}
	}
	return both
}

// owners lists the sections that a key belongs in.
func owners(key string) []string { return sections()[key] }

// sections lists the sections of every key, those of load cases left out.
var sections = sync.OnceValue(func() map[string][]string {
	all := map[string][]string{}
	for _, d := range Inputs() {
		if strings.HasPrefix(d.Path, "loads[].") {
			continue
		}
		owner, key := "the top level", d.Path
		if at := strings.LastIndex(d.Path, "."); at > 0 {
			owner, key = d.Path[:at], d.Path[at+1:]
		}
		all[key] = append(all[key], owner)
	}
	return all
})

func (r *reader) checkItems(v *value, in *input, path string) {
	if len(v.items) == 0 {
		if in.key != layers.key { // a body without layers may say so
			r.empty(v, in, path)
		}
		return
	}
	if len(v.items) > maxItems {
		r.bad(v, "E-313", path, Finding{Message: path + " is too long a list", Found: fmt.Sprintf("%d entries", len(v.items)), Expected: fmt.Sprintf("at most %d", maxItems)})
		return
	}
	for i, item := range v.items {
		if path == "loads" {
			break // each load is checked with its own body
		}
		r.check(item, in.each, itemPath(path, i))
	}
}

func itemPath(path string, i int) string { return fmt.Sprintf("%s[%d]", path, i+1) }

func (r *reader) checkQuantity(v *value, in *input, path string) {
	si, err := unit.Parse(v.text, in.kind)
	var pe *unit.ParseError
	if errors.As(err, &pe) {
		code := "E-301"
		if pe.InUnit {
			code = "E-302"
		}
		v.bad = true
		r.add(code, v.within(pe.Offset, pe.Width), path, Finding{
			Message: fmt.Sprintf("%s is not %s: %s", path, in.kind.Name(), v.text), Found: pe.Found, Expected: pe.Expected, Nearest: pe.Nearest, Help: pe.Hint})
		return
	}
	if !in.span.holds(si) {
		r.bad(v, "E-303", path, Finding{Message: path + " is out of range", Found: v.text, Expected: in.span.text})
		return
	}
	r.coldKelvin(v, in, si, path)
}

// coldest temperature in kelvin that is taken for meant, K.
const coldest = 150

// coldKelvin warns of a place on the scale typed in kelvin that is more likely
// meant in °C or as a rise.
func (r *reader) coldKelvin(v *value, in *input, si float64, path string) {
	number, inKelvin := strings.CutSuffix(strings.TrimSpace(v.text), "K")
	if in.kind != unit.Temperature || !inKelvin || si >= coldest {
		return
	}
	f := Finding{Message: fmt.Sprintf("%s is %s, which is %s", path, v.text, unit.SI.Show(unit.Temperature, si, 0)), Found: v.text,
		Expected: "a temperature in °C, or one of at least 150 K", Nearest: strings.TrimRight(number, " \u00a0") + " °C"}
	if in.key == "most" || in.key == "least" {
		f.Help = "a rise over the air is written rise: " + v.text
	}
	r.add("E-507", v.at, path, f)
}

// within is the place of a part of a scalar; the whole of it when the text in
// the file was folded or escaped.
func (v *value) within(offset, width int) place {
	quotes := 0
	if v.quoted {
		quotes = 2
	}
	length := utf8.RuneCountInString(v.text)
	if v.at.width != length+quotes || offset > length {
		return v.at
	}
	return place{v.at.line, v.at.column + quotes/2 + offset, max(1, min(width, length-offset))}
}

func (r *reader) checkWord(v *value, in *input, path string) {
	if in.key == "at" || in.words.knows(v.text) {
		return // a place depends on the body; see limits
	}
	f := in.words.unknown(v.text, in.example)
	if in.words == faceStates && startsWithDigit(v.text) {
		face := path[strings.LastIndex(path, ".")+1:]
		f.Help = "the temperature of what a face sees is written surroundings: {sees: {" + face + ": " + v.text + "}}"
	}
	r.bad(v, in.words.code, path, f)
}

func startsWithDigit(s string) bool {
	s = strings.TrimLeft(s, " +-\u2212")
	return s != "" && s[0] >= '0' && s[0] <= '9'
}

// unknown is the finding for a word that cannot stand here. Words that fit
// several entries of a catalogue are told so with these entries.
func (v *vocabulary) unknown(typed, example string) Finding {
	words := v.words()
	f := Finding{Message: fmt.Sprintf("the %s %s is not known", v.noun, quote(typed)), Found: quote(typed)}
	fit := fitting(typed, words)
	if v.known == nil || len(fit) == 0 {
		f.Expected, f.Nearest = v.expected(example), nearest(typed, words)
		return f
	}
	if len(fit) == 1 {
		f.Expected, f.Nearest = v.expected(example), fit[0]
		return f
	}
	f.Message = fmt.Sprintf("the %s %s fits %d entries of the table", v.noun, quote(typed), len(fit))
	f.Expected = "one of " + first(fit, 6)
	return f
}

// fitting lists the names that hold the words typed, else those that hold them
// as parts of words.
func fitting(typed string, names []string) (fit []string) {
	if fit = catalogue.Holding(typed, names); len(fit) > 0 {
		return fit
	}
	parts := strings.Fields(strings.ToLower(typed))
	for _, name := range names {
		if len(strings.Join(parts, "")) >= 3 && holdsAll(strings.ToLower(name), parts) {
			fit = append(fit, name)
		}
	}
	return fit
}

func (r *reader) checkText(v *value, in *input, path string) {
	if i := strings.IndexFunc(v.text, unprintable); i >= 0 {
		r.bad(v, "E-312", path, Finding{Message: path + " holds a control character", Found: fmt.Sprintf("U+%04X", []rune(v.text[i:])[0]), Expected: "plain text"})
		return
	}
	if n := utf8.RuneCountInString(v.text); n > maxText {
		r.bad(v, "E-312", path, Finding{Message: path + " is too long", Found: fmt.Sprintf("%d characters", n), Expected: fmt.Sprintf("at most %d", maxText)})
		return
	}
	if in.required && strings.TrimSpace(v.text) == "" {
		r.empty(v, in, path)
	}
}

// checkBodyKinds wants exactly one kind of body.
func (r *reader) checkBodyKinds(root *value) {
	b := root.pair("body")
	if b == nil || b.value.shape != mapping {
		return
	}
	var kinds []pair
	for _, p := range b.value.pairs {
		if slices.Contains(bodyKinds, p.key) {
			kinds = append(kinds, p)
		}
	}
	for _, p := range kinds[min(1, len(kinds)):] {
		r.add("E-207", p.at, "body."+p.key, Finding{Message: "a case has one body", Found: quote(p.key) + " beside " + quote(kinds[0].key), Expected: "exactly one of " + oneOf(bodyKinds)})
	}
}

// required reports the keys that a section lacks.
func (b *builder) required(v *value, in *input, at place, path string) {
	for _, p := range in.parts {
		got := v.pair(p.key)
		switch {
		case got == nil && p.required && !v.meant[p.key]:
			b.add("E-204", at, join(path, p.key), Finding{Message: join(path, p.key) + " is missing", Found: "no " + p.key, Expected: p.line()})
		case got != nil && p.form == section && got.value.shape == mapping && p != body:
			b.required(got.value, p, got.at, join(path, p.key))
		}
	}
}

// line is the input as a line of a case file.
func (in *input) line() string {
	if in.form != section {
		return in.key + ": " + in.example
	}
	for _, p := range in.parts {
		if p.required {
			return in.key + ": {" + p.key + ": " + p.example + ", ...}"
		}
	}
	return in.key + ": {" + in.parts[0].key + ": ...}"
}
