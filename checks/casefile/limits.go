package casefile

import (
	"fmt"
	"slices"

	"stillair/checks/limit"
)

// criteria are the keys of a limit of which exactly one is used.
var criteria = []string{"most", "least", "rise", "touch", "rule", "condensation"}

// Places that are no faces.
const (
	insideAir = "inside air"
	upperZone = "upper zone"
	anyFace   = "any face"
)

// places lists the words for at that fit a body.
func places(kind string, faces []string) []string {
	switch kind {
	case "":
		return append([]string{anyFace, insideAir, upperZone, "contents"}, faces...)
	case "box":
		return append([]string{insideAir, upperZone, anyFace}, faces...)
	}
	return append([]string{anyFace, "contents"}, faces...)
}

func (b *builder) limits() {
	v := b.root.get("limits")
	if v == nil || v.bad || v.shape != sequence {
		return
	}
	for i, item := range v.items {
		if item.shape != mapping {
			continue
		}
		path := itemPath("limits", i)
		b.required(item, limitEntry, item.at, path)
		b.place(item, path)
		b.oneCriterion(item, path)
		b.reason(item, path)
		b.touch(item, path)
		b.c.Limits = append(b.c.Limits, b.limit(item, path))
	}
}

func (b *builder) limit(v *value, path string) Limit {
	read := func(key string) Quantity {
		keep := len(b.inputs)
		q := b.quantity(limitEntry.part(key), v.get(key), join(path, key))
		b.inputs = b.inputs[:keep] // limits have a table of their own
		return q
	}
	l := Limit{At: v.textOf("at"), Most: read("most"), Least: read("least"), Rise: read("rise"), Touch: v.textOf("touch"), Contact: read("contact"),
		Rule: v.textOf("rule"), NoCondensation: v.textOf("condensation") == "none", Why: v.textOf("why"), Source: v.textOf("source"), Line: v.at.line}
	if e, ok := limit.Find(l.Rule); ok {
		l.Rule = e.ID
	}
	return l
}

// place checks where a limit holds against the body.
func (b *builder) place(v *value, path string) {
	at := v.get("at")
	if at == nil || at.bad || at.shape != scalar {
		return
	}
	fit := places(b.c.Body.Kind, b.r.faces)
	_, covered := b.c.Body.Covered[at.text]
	needsFace := v.get("touch") != nil || v.get("condensation") != nil
	f := Finding{Found: quote(at.text), Expected: "one of " + oneOf(fit)}
	switch {
	case slices.Contains(fit, at.text) && covered:
		f.Message, f.Help = "a limit is set for "+at.text+", a covered face", "a covered face has no temperature of its own"
		b.found = append(b.found, misfit{code: "E-406", path: join(path, "at"), at: at.at, f: f, always: true})
		return
	case slices.Contains(fit, at.text) && needsFace && !slices.Contains(b.r.faces, at.text) && at.text != anyFace:
		f.Message, f.Expected = "a touch or condensation limit needs a face", "any face, or one of "+oneOf(b.r.faces)
	case slices.Contains(fit, at.text):
		return
	case limitEntry.part("at").words.knows(at.text):
		f.Message = fmt.Sprintf("a %s has no %s", b.c.Body.Kind, at.text)
	default:
		f.Message, f.Nearest = "the place "+quote(at.text)+" is not known", nearestFace(at.text, fit)
		b.add("E-305", at.at, join(path, "at"), f)
		return
	}
	b.add("E-406", at.at, join(path, "at"), f, b.bodyPath("axis"))
}

// oneCriterion wants exactly one criterion.
func (b *builder) oneCriterion(v *value, path string) {
	var given []*pair
	for _, key := range criteria {
		if v.meant[key] {
			return
		}
		if p := v.pair(key); p != nil {
			given = append(given, p)
		}
	}
	f := Finding{Message: "a limit needs one criterion", Found: "none", Expected: "one of " + oneOf(criteria)}
	switch {
	case len(given) == 0:
		b.add("E-404", v.at, path, f)
	case len(given) > 1:
		f.Found = quote(given[1].key) + " beside " + quote(given[0].key)
		f.Help = "write two limits"
		b.add("E-404", given[1].at, join(path, given[1].key), f)
	}
}

// reason wants to know where a project limit comes from.
func (b *builder) reason(v *value, path string) {
	own := v.get("most") != nil || v.get("least") != nil || v.get("rise") != nil
	if !own || v.textOf("why") != "" || v.textOf("source") != "" || v.meant["why"] || v.meant["source"] {
		return
	}
	b.add("E-405", v.at, path, Finding{Message: "the limit has neither a reason nor a source", Found: "no why, no source",
		Expected: "why: drive rating, sheet 4, or source: a standard with its edition"})
}

// touch wants material and contact time together, and warns of short contact.
func (b *builder) touch(v *value, path string) {
	t, c := v.pair("touch"), v.pair("contact")
	switch {
	case t != nil && c == nil && !v.meant["contact"]:
		b.add("E-414", t.at, join(path, "contact"), Finding{Message: "a touch limit needs a contact time", Found: "no contact", Expected: "contact: 10 s"})
	case c != nil && t == nil && !v.meant["touch"]:
		b.add("E-414", c.at, join(path, "touch"), Finding{Message: "a contact time needs a surface material", Found: "no touch", Expected: "touch: one of " + oneOf(limit.TouchMaterials())})
	case c != nil && !c.value.bad:
		keep := len(b.inputs)
		q := b.quantity(limitEntry.part("contact"), c.value, join(path, "contact"))
		b.inputs = b.inputs[:keep]
		if q.Set && q.SI < 1 {
			b.add("E-504", c.value.at, join(path, "contact"), Finding{Message: "a contact of less than 1 s supposes that a person can let go at once",
				Found: c.value.text, Expected: "1 s or longer", Help: "burn thresholds of such short contact are for unintended touch by able adults"})
		}
	}
}

// condensation wants the humidity in at least one load case when a limit
// forbids condensation.
func (r *reader) condensation(cases []Case, root *value) {
	if slices.ContainsFunc(cases, func(c Case) bool { return c.Surroundings.Humidity.Set }) {
		return
	}
	v := root.get("limits")
	if v == nil || v.bad || humidityTyped(root) {
		return
	}
	for i, item := range v.items {
		if p := item.pair("condensation"); p != nil {
			r.add("E-408", p.at, itemPath("limits", i)+".condensation", Finding{Message: "no load case has a humidity, so condensation cannot be judged",
				Found: "no humidity", Expected: "humidity: 85 % in surroundings or in a load case"})
		}
	}
}

// humidityTyped reports whether a humidity is there at all, readable or not.
func humidityTyped(root *value) bool {
	if s := root.get("surroundings"); s.get("humidity") != nil || s != nil && s.meant["humidity"] {
		return true
	}
	loads := root.get("loads")
	return loads != nil && slices.ContainsFunc(loads.items, func(l *value) bool { return l.get("humidity") != nil || l.meant["humidity"] })
}
