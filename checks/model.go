package checks

import (
	"fmt"
	"math"

	"stillair/checks/balance"
	"stillair/checks/casefile"
	"stillair/checks/material"
	"stillair/freeconv"
	"stillair/freeconv/fluid"
	"stillair/geometry"
	"stillair/radiation"
)

// side of a film.
const (
	outside = "outside"
	inside  = "inside"
)

// filmKey names one film of a body.
type filmKey struct{ face, side string }

// tuning multiplies what a case does not hold as a plain number of its own:
// film coefficients, and the conductivity and thickness of layers by position
// (0 is the wall). Missing entries count as 1.
type tuning struct {
	film         map[filmKey]float64
	conductivity map[int]float64
	thickness    map[int]float64
}

func factor[K comparable](m map[K]float64, k K) float64 {
	if f, ok := m[k]; ok {
		return f
	}
	return 1
}

// solid is one layer: its conductivity and its name.
type solid struct {
	index int
	name  string
	mat   *material.Material // nil: constant k
	k     float64
}

// mean is the mean conductivity between two temperatures, W/(m·K).
func (s solid) mean(t1, t2 float64) float64 {
	if s.mat != nil {
		return s.mat.Mean(t1, t2)
	}
	return s.k
}

// face is one free face of the model with its nodes and links.
type face struct {
	part    geometry.Part
	solids  []solid
	inner   balance.Node // inside surface; the core when there is no inside film
	between []balance.Node
	outer   balance.Node
	seen    balance.Node // where its radiation goes
	sun     float64      // W absorbed
	convect int          // link numbers
	inFilm  int          // -1 when the face has no inside film
}

// model is a case turned into a heat balance.
type model struct {
	c        casefile.Case
	b        *balance.Balance
	gas      fluid.Gas
	pressure float64
	choice   freeconv.Choice
	air      balance.Node
	core     balance.Node
	coreName string
	coreKind string
	faces    []face
	t        tuning
}

// compile turns a case into its heat balance. It reads nothing and keeps no
// state, so shifted cases can be compiled as often as needed.
func compile(c casefile.Case, choice freeconv.Choice, t tuning) *model {
	m := &model{c: c, t: t, gas: fluid.Air, choice: choice, pressure: pressure(c.Surroundings)}
	m.b = balance.New(c.Surroundings.Air.SI)
	m.air = m.b.Fixed("air", c.Surroundings.Air.SI)
	around := m.b.Fixed("surroundings", c.Surroundings.Radiant.SI)
	parts, solids := m.parts()
	m.addCore(solids)
	for _, p := range parts {
		if _, covered := c.Body.Covered[p.Face.Name]; !covered {
			m.addFace(p, solids, around)
		}
	}
	return m
}

func pressure(s casefile.Surroundings) float64 {
	if s.Pressure.Set {
		return s.Pressure.SI
	}
	return fluid.StandardPressure(s.Altitude.SI)
}

// parts makes the faces and layers of the body.
func (m *model) parts() ([]geometry.Part, []solid) {
	b := m.c.Body
	stack, solids := m.stack()
	w, h := b.Width.SI, b.Height.SI
	d, l := b.Diameter.SI, b.Length.SI
	lying := b.Axis == "horizontal"
	switch b.Kind {
	case "plate":
		return geometry.Plate(w, h, b.Tilt.SI*180/math.Pi, stack), solids
	case "box":
		return geometry.Box(w, h, b.Depth.SI, stack), solids
	case "cylinder":
		return geometry.Cylinder(d, l, lying, true, stack), solids
	case "pipe":
		return geometry.Cylinder(d, l, lying, false, stack), solids
	case "vessel":
		return geometry.Vessel(d, l, lying, b.Heads == "dished", stack), solids
	}
	return geometry.Ball(d, stack), solids
}

// stack lists the thicknesses and conductivities of wall and layers.
func (m *model) stack() (geometry.Stack, []solid) {
	var s geometry.Stack
	var solids []solid
	if w := m.c.Body.Wall; w != nil {
		s.Wall = w.Thickness.SI * factor(m.t.thickness, 0)
		solids = append(solids, m.solid(0, *w))
	}
	for i, l := range m.c.Body.Layers {
		s.Layers = append(s.Layers, l.Thickness.SI*factor(m.t.thickness, i+1))
		solids = append(solids, m.solid(i+1, l))
	}
	return s, solids
}

func (m *model) solid(index int, l casefile.Layer) solid {
	s := solid{index: index, name: l.Material, k: l.Conductivity.SI}
	if s.name == "" {
		s.name = "layer with k = " + l.Conductivity.Typed
	}
	if !l.Conductivity.Set {
		if mat, ok := material.Find(l.Material); ok {
			s.mat, s.name = &mat, mat.Name
		}
	}
	return s
}

// addCore makes the node the heat comes from.
func (m *model) addCore(solids []solid) {
	box := m.c.Body.Kind == "box"
	switch {
	case m.c.Contents.Set && box:
		m.coreName, m.coreKind = "inside air", "air"
	case m.c.Contents.Set:
		m.coreName, m.coreKind = "contents", "contents"
	case box:
		m.coreName, m.coreKind = "inside air", "air"
	case len(solids) > 0:
		m.coreName, m.coreKind = "body", "body"
	default:
		m.coreName, m.coreKind = "surface", "outer surface"
	}
	if m.c.Contents.Set {
		m.core = m.b.Fixed(m.coreName, m.c.Contents.SI)
		return
	}
	m.core = m.b.Unknown(m.coreName)
	m.b.Source(m.core, m.c.Heat.SI)
}

// addFace makes the nodes and links of one free face, from the inside out.
func (m *model) addFace(p geometry.Part, solids []solid, around balance.Node) {
	f := face{part: p, solids: solids, inner: m.core, inFilm: -1, seen: around}
	name := p.Face.Name
	at := m.core
	if m.c.Body.Kind == "box" {
		f.inner = m.b.Unknown(insideName(name, len(solids) > 0))
		f.inFilm = m.insideFilm(f)
		at = f.inner
	}
	for i, s := range p.Slabs {
		next := m.b.Unknown(m.afterLayer(name, i, solids))
		m.b.Connect(at, next, "conduction", m.conduction(s, solids[i]))
		if i+1 < len(p.Slabs) {
			f.between = append(f.between, next)
		}
		at = next
	}
	f.outer = at
	m.outsideLinks(&f)
	m.faces = append(m.faces, f)
}

func insideName(face string, walled bool) string {
	if walled {
		return face + ", inside"
	}
	return face
}

// afterLayer names the node on the outside of layer i.
func (m *model) afterLayer(face string, i int, solids []solid) string {
	if i+1 == len(solids) {
		return face
	}
	return fmt.Sprintf("%s, between %s and %s", face, solids[i].place(), solids[i+1].place())
}

// place is the position of a layer in words.
func (s solid) place() string {
	if s.index == 0 {
		return "wall"
	}
	return fmt.Sprintf("layer %d", s.index)
}

func (m *model) conduction(s geometry.Slab, k solid) balance.Law {
	g := s.Factor() * factor(m.t.conductivity, k.index)
	return func(dt, t1, t2 float64) float64 { return g * k.mean(t1, t2) * dt }
}

// insideFilm joins the inside air to the inside of a wall: free convection on
// the wall, and radiation from the equipment, taken to be as warm as the air.
func (m *model) insideFilm(f face) int {
	in := f.part.Inside
	g := in.Area * factor(m.t.film, filmKey{in.Name, inside})
	m.b.Connect(m.core, f.inner, "convection", func(dt, ta, ts float64) float64 {
		return g * freeconv.HeatCoefficient(in, m.filmState(ts, ta, -dt), m.choice) * dt
	})
	eps := m.c.Inside.Emissivity.SI
	m.b.Connect(m.core, f.inner, "radiation", func(dt, ta, ts float64) float64 {
		return in.Area * radiation.Exchange(eps, dt, ta, ts)
	})
	return len(m.b.Links) - 2
}

// outsideLinks joins the outside of a face to the air and to what it sees, and
// lets the sun on it.
func (m *model) outsideLinks(f *face) {
	out := f.part.Face
	if q, ok := m.c.Surroundings.Sees[out.Name]; ok {
		f.seen = m.b.Fixed("what "+out.Name+" sees", q.SI)
	}
	g := out.Area * factor(m.t.film, filmKey{out.Name, outside})
	f.convect = len(m.b.Links)
	m.b.Connect(f.outer, m.air, "convection", func(dt, ts, ta float64) float64 {
		return g * freeconv.HeatCoefficient(out, m.filmState(ts, ta, dt), m.choice) * dt
	})
	eps := m.c.Body.Emissivity.Typical
	m.b.Connect(f.outer, f.seen, "radiation", func(dt, ts, tr float64) float64 {
		return out.Area * radiation.Exchange(eps, dt, ts, tr)
	})
	if sun, ok := m.c.Surroundings.Sun[out.Name]; ok {
		f.sun = out.Area * radiation.Absorbed(sun.SI, m.c.Body.Absorb.Typical)
		m.b.Source(f.outer, f.sun)
	}
}

func (m *model) filmState(ts, ta, dt float64) freeconv.State {
	return freeconv.State{Gas: m.gas, P: m.pressure, Ts: ts, Ta: ta, DT: dt}
}

// films evaluates every film in full at the solution.
func (m *model) films(s balance.Solution) []FilmRow {
	var rows []FilmRow
	for _, f := range m.faces {
		out := m.filmRow(f.part.Face, outside, s, f.outer, m.air, f.convect)
		out.Emissivity, out.RadiantK = m.c.Body.Emissivity.Typical, s.T[f.seen]
		if sun, ok := m.c.Surroundings.Sun[out.At]; ok {
			out.SunWm2, out.Absorptance, out.SunW = sun.SI, m.c.Body.Absorb.Typical, f.sun
		}
		rows = append(rows, out)
		if f.inFilm >= 0 {
			in := m.filmRow(f.part.Inside, inside, s, f.inner, m.core, f.inFilm)
			in.Emissivity, in.RadiantK = m.c.Inside.Emissivity.SI, s.T[m.core]
			rows = append(rows, in)
		}
	}
	return rows
}

func (m *model) filmRow(g geometry.Face, side string, s balance.Solution, surface, air balance.Node, link int) FilmRow {
	v := freeconv.Evaluate(g, m.filmState(s.T[surface], s.T[air], s.Excess[surface]-s.Excess[air]), m.choice)
	tuned := factor(m.t.film, filmKey{g.Name, side})
	return FilmRow{
		At: g.Name, Side: side, Method: v.Method.Name, MethodID: v.Method.ID, Source: v.Method.Citation, Why: v.Why,
		LengthM: v.Length, Length: v.LengthText, FilmK: v.TProps, Gr: v.Gr, Ra: v.Ra, Pr: v.Props.Pr, Nu: v.Nu,
		H: v.H * tuned, AreaM2: g.Area, W: s.Heat[link], RadiationW: s.Heat[link+1], Regime: v.Regime, InRange: v.InRange, Range: v.RangeNote,
		Notes: v.Notes, Film: v,
	}
}
