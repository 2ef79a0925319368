package checks

import (
	"math"

	"stillair/checks/balance"
)

// temps lists every reported temperature at a solution: the core, the upper
// zone of a box, every face, what lies under it.
func (m *model) temps(s balance.Solution) []Temp {
	var rows []Temp
	add := func(at, kind string, k float64) { rows = append(rows, Temp{At: at, Kind: kind, K: k}) }
	if m.coreName != "surface" {
		add(m.coreName, m.coreKind, s.T[m.core])
	}
	if m.c.Body.Kind == "box" {
		add("upper zone", "zone", m.c.Surroundings.Air.SI+m.upperRise(s.Excess[m.core]))
	}
	for _, f := range m.faces {
		add(f.part.Face.Name, "outer surface", s.T[f.outer])
	}
	for _, f := range m.faces {
		if f.inFilm >= 0 && len(f.solids) > 0 {
			add(m.b.Name(f.inner), "inner surface", s.T[f.inner])
		}
		for _, n := range f.between {
			add(m.b.Name(n), "interface", s.T[n])
		}
	}
	return rows
}

// heatPaths lists the sources and what flows through every link, with the
// share of each in what is exchanged with the air and the surroundings.
func (m *model) heatPaths(s balance.Solution) []HeatPath {
	var rows []HeatPath
	if m.c.Heat.Set {
		rows = append(rows, HeatPath{From: "heat input", To: m.coreName, By: "source", W: m.c.Heat.SI})
	}
	for _, f := range m.faces {
		if f.sun != 0 {
			rows = append(rows, HeatPath{From: "sun", To: f.part.Face.Name, By: "sun", W: f.sun})
		}
	}
	shed := 0.0
	owner := m.owners()
	for i, l := range m.b.Links {
		from, final := m.b.Name(l.From), false
		if name, ok := owner[i]; ok {
			from, final = name, true
			shed += math.Abs(s.Heat[i])
		}
		rows = append(rows, HeatPath{From: from, To: m.b.Name(l.To), By: l.By, W: s.Heat[i], Final: final})
	}
	for i := range rows {
		if rows[i].Final && shed > 0 {
			rows[i].Share = math.Abs(rows[i].W) / shed
		}
	}
	return rows
}

// owners maps the links that end in the air or in what the faces see to the
// face they leave. A body without layers has one node for all its faces; so
// each face still speaks for itself.
func (m *model) owners() map[int]string {
	own := map[int]string{}
	for _, f := range m.faces {
		own[f.convect] = f.part.Face.Name
		own[f.convect+1] = f.part.Face.Name
	}
	return own
}

// idleStep is the temperature step over a layer, K, below which its
// conductivity has no bearing on any result.
const idleStep = 0.05

// layers lists the conduction through every layer, face by face from the
// inside out.
func (m *model) layers(s balance.Solution) []LayerRow {
	rows := []LayerRow{}
	for _, f := range m.faces {
		link := f.convect - len(f.part.Slabs) // a face's layers stand right before its outside film
		for i, slab := range f.part.Slabs {
			k, l := f.solids[i], m.b.Links[link+i]
			t1, t2 := s.T[l.From], s.T[l.To]
			rows = append(rows, LayerRow{
				At: f.part.Face.Name, Place: k.place(), Material: k.name, ThicknessM: slab.Thickness, FactorM: slab.Factor(),
				K: k.mean(t1, t2) * factor(m.t.conductivity, k.index), InnerK: t1, OuterK: t2, W: s.Heat[link+i],
				InRange: k.mat == nil || k.mat.InRange(t1, t2) || math.Abs(t1-t2) < idleStep, Solid: k.mat,
				AreaM2: slab.Area, LengthM: slab.Length, InnerM: slab.Inner, OuterM: slab.Outer,
			})
		}
	}
	return rows
}

// heatShed is the heat in W that leaves the core: what goes to the air and the
// surroundings less what the sun brings.
func (m *model) heatShed(s balance.Solution) float64 {
	w := 0.0
	for _, f := range m.faces {
		w += s.Heat[f.convect] + s.Heat[f.convect+1] - f.sun
	}
	return w
}

// upperRise is the rise of the upper zone of a box over the air outside: the
// mean rise times the assumed factor. Inside air that is cooler than the air
// outside sinks; its upper zone is taken at the mean.
func (m *model) upperRise(mean float64) float64 {
	if mean <= 0 {
		return mean
	}
	return m.c.Inside.UpperZone.SI * mean
}
