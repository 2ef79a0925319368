package casefile

import (
	"fmt"
	"slices"
	"strings"
)

// tell hands findings to the reader.
func (r *reader) tell(found []misfit) {
	for _, m := range found {
		r.add(m.code, m.at, m.path, m.f)
	}
}

// same reports whether two findings are about the same thing, wherever told.
func (m misfit) same(o misfit) bool {
	return m.code == o.code && m.path == o.path && m.f.Found == o.f.Found
}

// heard is a finding with the load cases that have it.
type heard struct {
	misfit
	shared bool // the case as described has it as well
	names  []string
}

// tellOfLoads reports what does not fit together in load cases. What the case
// as described and all of them share is told once, anything else names them
// and points to what they type.
func (r *reader) tellOfLoads(described *builder, built []*loadBuilder) {
	var all []heard
	for _, b := range built {
		for _, m := range b.found {
			shared := slices.ContainsFunc(described.found, m.same) && !(m.missing() && !everyLoad(built, m))
			if !shared && !m.always {
				m.at = b.cause(m)
				m.f.Help = listHelp(m)
			}
			all = gather(all, m, shared, b.name())
		}
	}
	for _, h := range all {
		everywhere := len(h.names) == len(built)
		if h.always && !everywhere {
			continue
		}
		if !h.always && !(h.shared && everywhere) {
			h.f.Message = inLoads(h.names) + h.f.Message
		}
		r.add(h.code, h.at, h.path, h.f)
	}
}

// missing reports whether something was not typed that a load case can bring.
func (m misfit) missing() bool { return m.code == "E-204" || m.code == "E-208" }

func everyLoad(built []*loadBuilder, m misfit) bool {
	return !slices.ContainsFunc(built, func(b *loadBuilder) bool { return !slices.ContainsFunc(b.found, m.same) })
}

// gather adds a finding to those heard at the same place.
func gather(all []heard, m misfit, shared bool, name string) []heard {
	i := slices.IndexFunc(all, func(h heard) bool { return h.same(m) && h.at == m.at })
	if i < 0 {
		return append(all, heard{m, shared, []string{name}})
	}
	if !slices.Contains(all[i].names, name) {
		all[i].names = append(all[i].names, name)
	}
	return all
}

func inLoads(names []string) string {
	if len(names) == 1 {
		return "in load case " + names[0] + ": "
	}
	last := len(names) - 1
	return "in load cases " + strings.Join(names[:last], ", ") + " and " + names[last] + ": "
}

// name is how a load case is called in a finding.
func (b *loadBuilder) name() string {
	if b.c.Load.Name == "" {
		return fmt.Sprintf("number %d", b.number)
	}
	return quote(b.c.Load.Name)
}

// cause is the place in the load case that a finding comes from; its name when
// nothing it types is known to be the cause.
func (b *loadBuilder) cause(m misfit) place {
	if b.item.covers(m.at) {
		return m.at
	}
	for _, path := range append([]string{m.path}, m.causes...) {
		if p := b.over.pairAt(path); p != nil {
			return p.at
		}
	}
	if name := b.item.pair("name"); name != nil {
		return name.at
	}
	return b.item.at
}

// covers reports whether a place is that of a key or value below v.
func (v *value) covers(at place) bool {
	if v == nil || v.at == at {
		return v != nil
	}
	return slices.ContainsFunc(v.pairs, func(p pair) bool { return p.at == at || p.value.covers(at) }) ||
		slices.ContainsFunc(v.items, func(item *value) bool { return item.covers(at) })
}

// pairAt follows keys joined by dots to the last pair.
func (v *value) pairAt(path string) *pair {
	section, key := "", path
	if i := strings.LastIndex(path, "."); i >= 0 {
		section, key = path[:i], path[i+1:]
		v = v.path(section)
	}
	return v.pair(key)
}

// listHelp reminds that a list is not merged.
func listHelp(m misfit) string {
	if m.f.Help == "" && strings.Contains(m.path, "."+layers.key+"[") {
		return "a list typed in a load case replaces the whole list of the case: write every layer in full"
	}
	return m.f.Help
}
