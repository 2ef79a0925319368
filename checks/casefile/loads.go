package casefile

import (
	"slices"
	"strings"

	"stillair/checks/unit"
)

// rivals lists inputs that one typed in a load case replaces, by path in the
// case; the last key alone for parts of a body.
var rivals = map[string][]string{
	"heat":                  {"contents"},
	"contents":              {"heat"},
	"surroundings.pressure": {"altitude"},
	"surroundings.altitude": {"pressure"},
	"body..finish":          {"emissivity", "absorptance"},
	"body..material":        {"conductivity"},
}

func rivalsOf(path string) []string {
	if rest, ok := strings.CutPrefix(path, "body."); ok {
		return rivals["body.."+rest[strings.LastIndex(rest, ".")+1:]]
	}
	return rivals[path]
}

// merge lays one tree over another: sections are merged key by key, anything
// else is replaced. Neither argument changes.
func merge(under, over *value, path string) *value {
	if under == nil || under.shape != mapping || over.shape != mapping {
		return over
	}
	m := *over
	m.at, m.pairs = under.at, slices.Clone(under.pairs)
	for _, p := range over.pairs {
		at := join(path, p.key)
		m.pairs = slices.DeleteFunc(m.pairs, func(q pair) bool { return over.pair(q.key) == nil && replaces(at, q) })
		old := m.pair(p.key)
		switch {
		case old == nil:
			m.pairs = append(m.pairs, p)
		case old.at.line > 0 && old.value.shape == mapping && p.value.shape == mapping:
			old.value = merge(old.value, p.value, at)
		default:
			*old = pair{p.key, p.at, merge(old.value, p.value, at)}
		}
	}
	m.meant = both(under.meant, over.meant)
	return &m
}

// replaces reports whether typing the input at path removes another one of
// its section: a rival, or surroundings from the settings once the air is typed.
func replaces(path string, other pair) bool {
	if path == "surroundings.air" && other.key == radiant.key {
		return other.value.setting
	}
	return slices.Contains(rivalsOf(path), other.key)
}

func both(a, b map[string]bool) map[string]bool {
	all := map[string]bool{}
	for k := range a {
		all[k] = true
	}
	for k := range b {
		all[k] = true
	}
	return all
}

// overlay writes a load case as a partial case: its short names go where they
// belong.
func overlay(load *value) *value {
	top := &value{shape: mapping, at: load.at}
	around := &value{shape: mapping, at: load.at}
	for _, p := range load.pairs {
		switch {
		case p.key == "name" || p.key == "for" || loadEntry.part(p.key) == nil:
		case surroundings.part(p.key) != nil:
			around.pairs = append(around.pairs, p)
		default:
			top.pairs = append(top.pairs, p)
		}
	}
	if len(around.pairs) > 0 {
		top.pairs = append(top.pairs, pair{"surroundings", around.pairs[0].at, around})
	}
	return top
}

// loads checks the load cases and makes a Case of each.
func (r *reader) loads(base, all *value, described *builder) (cases []Case) {
	var built []*loadBuilder
	for i, item := range all.items {
		if b := r.load(base, item, i); b != nil {
			built, cases = append(built, b), append(cases, b.c)
		}
	}
	r.sameNames(all)
	r.tellOfLoads(described, built)
	return cases
}

// loadBuilder builds a load case: over is what it types, as a partial case.
type loadBuilder struct {
	*builder
	item, over *value
	number     int
}

// load checks one load case and makes its Case; nil when it is none.
func (r *reader) load(base, item *value, i int) *loadBuilder {
	path := itemPath("loads", i)
	if item.shape != mapping {
		r.check(item, loadEntry, path)
		return nil
	}
	r.sameBody(base, item, path)
	over := overlay(item)
	merged := merge(base, over, "")
	kind, axis := bodyOf(merged)
	if was, _ := bodyOf(base); was != "" {
		kind = was
	}
	r.faces = facesOf(kind, axis)
	r.check(item, loadEntry, path)
	own := newBuilder(r, item)
	own.required(item, loadEntry, item.at, path)
	r.tell(own.found)
	b := &loadBuilder{newBuilder(r, merged), item, over, i + 1}
	b.build()
	b.c.Load = Load{Name: item.textOf("name"), Purpose: item.textOf("for"), Changed: changes(over, description, "")}
	r.radiantStays(base, item, path)
	return b
}

func (v *value) textOf(key string) string {
	if t := v.get(key); t != nil && t.shape == scalar && !t.bad {
		return strings.TrimSpace(t.text)
	}
	return ""
}

// sameBody refuses a load case that changes the kind of body, and takes the
// other body out of it.
func (r *reader) sameBody(base, item *value, path string) {
	was, _ := bodyOf(base)
	b := item.get("body")
	if was == "" || b == nil {
		return
	}
	b.pairs = slices.DeleteFunc(b.pairs, func(p pair) bool {
		if p.key == was || !slices.Contains(bodyKinds, p.key) {
			return false
		}
		r.add("E-412", p.at, join(path, "body."+p.key), Finding{Message: "a load case cannot change the kind of body",
			Found: quote(p.key), Expected: "changes to " + was, Nearest: was})
		b.bad = len(b.pairs) == 1
		return true
	})
}

func (v *value) children() []pair {
	if v == nil {
		return nil
	}
	return v.pairs
}

// radiantStays warns when a load changes the air but not a typed radiant temperature.
func (r *reader) radiantStays(base, item *value, path string) {
	typed := base.path("surroundings.radiant")
	a := item.pair("air")
	if typed == nil || typed.bad || a == nil || item.get("radiant") != nil {
		return
	}
	r.add("E-506", a.at, join(path, "air"), Finding{Message: "the load case changes the air but not the radiant temperature, which stays at " + typed.text,
		Found: "air without radiant", Expected: "radiant beside air", Help: "type radiant in the load case, or leave it out of surroundings to follow the air"})
}

// sameNames reports load cases of one name.
func (r *reader) sameNames(loads *value) {
	first := map[string]int{}
	for _, item := range loads.items {
		v := item.get("name")
		name := strings.ToLower(item.textOf("name"))
		if name == "" {
			continue
		}
		if line, twice := first[name]; twice {
			r.bad(v, "E-407", "loads.name", Finding{Message: "two load cases have the name " + quote(v.text), Found: quote(v.text) + " again", Expected: "a name of its own",
				Help: "the first one is on " + lineWord(line)})
			continue
		}
		first[name] = v.at.line
	}
}

// changes lists the inputs that a partial case types.
func changes(v *value, in *input, path string) (all []Input) {
	switch {
	case v == nil || v.bad || in == nil:
		return nil
	case in.form == section || in.form == byName:
		for _, p := range v.pairs {
			all = append(all, changes(p.value, in.child(p.key), join(path, p.key))...)
		}
	case in.form == list:
		for i, item := range v.items {
			all = append(all, changes(item, in.each, itemPath(path, i))...)
		}
	default:
		all = append(all, Input{Path: path, Label: labelOf(in, path), Typed: v.text, SI: siText(in, v.text), Source: v.source()})
	}
	return all
}

// siText is a typed value in SI units; words stay as they are.
func siText(in *input, typed string) string {
	if in.form != quantity {
		return typed
	}
	si, err := unit.Parse(typed, in.kind)
	if err != nil {
		return ""
	}
	return plainSI(in.kind, si)
}
