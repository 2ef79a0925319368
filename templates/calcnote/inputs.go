package calcnote

import (
	"fmt"
	"slices"
	"strings"

	"stillair/checks/casefile"
	"stillair/checks/unit"
	"stillair/templates/drawing"
	"stillair/templates/pdf"
)

// purpose is the first section: what the note is for and what it leaves out.
func (n *note) purpose() {
	n.section("Purpose and boundaries")
	if p := strings.TrimSpace(n.head().Purpose); p != "" {
		n.text(p)
	} else {
		n.text("The case file states no purpose. The note reports the steady temperatures of the body described below and compares them with the limits given.")
	}
	for _, r := range n.o.Loads[0].Case.Remarks {
		n.bullet(r)
	}
	n.part("What is included and what is not", 30)
	var rows []pdf.Row
	for _, b := range n.boundaries() {
		rows = append(rows, cells(b.what, b.state, b.how))
	}
	n.table([]pdf.Column{{Head: "Effect", Width: 44}, {Head: "Included", Width: 22}, {Head: "How, or what is taken instead", Width: 104}}, rows)
}

type boundary struct{ what, state, how string }

func (n *note) boundaries() []boundary {
	const yes, no = "yes", "no"
	list := []boundary{
		{"Free convection", yes, "Published correlations, see the section on methods; still air."},
		{"Thermal radiation", yes, "Grey diffuse faces to large surroundings at the radiant temperature given."},
		{"Conduction through walls and layers", no, "No wall or layer is described: the surface is at the temperature inside."},
		{"Wind, draught, fans", no, "Still air. Wind cools faces in the shade; it is not credited."},
		{"Sun", no, "No irradiance is given. A body that the sun can reach gets warmer than stated here."},
		{"Hot or cold neighbours", no, "Only the radiant temperature given; no single neighbour is modelled."},
		{"Humidity and condensation", no, "No humidity is given."},
		{"Altitude and air pressure", yes, n.pressures()},
		{"Change with time", no, "Steady state: every temperature is the one reached when nothing changes any more."},
		{"Local hot spots, thermal bridges, vents, flanges, supports", no, "Faces are isothermal at their mean temperature; see the cautions."},
	}
	if b := n.o.Loads[0].Case.Body; b.Wall != nil || len(b.Layers) > 0 {
		list[2] = boundary{list[2].what, yes, "Fourier's law, layer by layer, across the layers only."}
	}
	if names := n.loadsWith(func(c casefile.Case) bool { return len(c.Surroundings.Sun) > 0 }); names != "" {
		list[4] = boundary{"Sun", yes, "Irradiance per face as typed, times the solar absorptance; in load case " + names + "."}
	}
	if names := n.loadsWith(func(c casefile.Case) bool { return len(c.Surroundings.Sees) > 0 }); names != "" {
		list[5] = boundary{list[5].what, "in part", "Single faces see a radiant temperature of their own; in load case " + names + "."}
	}
	if names := n.loadsWith(func(c casefile.Case) bool { return c.Surroundings.Humidity.Set }); names != "" {
		list[6] = boundary{list[6].what, yes, "Dew point of the air around, compared with the faces; in load case " + names + "."}
	}
	return list
}

func (n *note) loadsWith(has func(casefile.Case) bool) string {
	var names []string
	for _, l := range n.o.Loads {
		if has(l.Case) {
			names = append(names, l.Name)
		}
	}
	if len(names) == len(n.o.Loads) && len(names) > 1 {
		return "all"
	}
	return strings.Join(names, ", ")
}

func (n *note) pressures() string {
	var list []string
	for _, l := range n.o.Loads {
		s := n.sys.Show(unit.Pressure, l.PressurePa, 2)
		if l.PressurePa > 0 && !slices.Contains(list, s) {
			list = append(list, s)
		}
	}
	if len(list) == 0 {
		return notComputed
	}
	return "Air properties at " + strings.Join(list, ", ") + "."
}

// inputs lists every input as typed, in SI units, and where it comes from.
func (n *note) inputs() {
	n.section("Inputs")
	if n.o.File == nil || len(n.o.File.Inputs) == 0 {
		n.text("The list of inputs is not available in this outcome.")
		return
	}
	n.text("Each input as typed, its value in SI units as the calculation uses it, and its source. Rows marked A are assumptions: nobody typed them.")
	var rows []pdf.Row
	for _, in := range n.o.File.Inputs {
		rows = append(rows, n.inputRow(in))
	}
	n.table([]pdf.Column{{Head: "", Width: 5}, {Head: "Input", Width: 52}, {Head: "As typed", Width: 38}, {Head: "SI value", Width: 32}, {Head: "Source", Width: 43}}, rows)
	n.changes()
	if w := n.o.File.Warnings; len(w) > 0 {
		n.part("Remarks of the reader on the case file", 10)
		for _, f := range w {
			n.bullet(fmt.Sprintf("Line %d: %s", f.Line, f.Message))
		}
	}
}

func (n *note) inputRow(in casefile.Input) pdf.Row {
	mark := ""
	if in.Assumption {
		mark = "A"
	}
	r := cells(mark, in.Label, in.Typed, in.SI, in.Source)
	r.Cells[0].Face = pdf.Bold
	r.Shade = in.Assumption
	return r
}

// changes lists what each load case changes.
func (n *note) changes() {
	n.part("Load cases", 20)
	var rows []pdf.Row
	for _, l := range n.o.Loads {
		name, purpose := l.Name, orNone(l.Purpose)
		if len(l.Changed) == 0 {
			rows = append(rows, cells(name, purpose, "as described", "", ""))
		}
		for i, c := range l.Changed {
			if i > 0 {
				name, purpose = "", ""
			}
			rows = append(rows, cells(name, purpose, c.Label, c.Typed, c.SI))
		}
	}
	n.table([]pdf.Column{{Head: "Load case", Width: 34}, {Head: "Purpose", Width: 28}, {Head: "Changes", Width: 50}, {Head: "To", Width: 32}, {Head: "SI value", Width: 26}}, rows)
}

// pictures are the body to scale and its heat balance.
func (n *note) pictures() {
	body := drawing.Body(n.o, n.gov, n.width(), bodyHeight(n.load().Case.Body))
	n.sectionRoom("The body and where its heat goes", min(body.H+balanceHeight+44, n.d.Bottom()-n.d.Top()))
	n.textf("Dimensioned views of the body with the mean face temperatures of the governing load case, “%s”.", n.load().Name)
	n.scene(body, "Figure 1  The body; scale and unit of the dimensions as stated in the picture.")
	n.scene(drawing.HeatBalance(n.o, n.gov, n.width(), balanceHeight), fmt.Sprintf("Figure 2  Heat balance of the governing load case, “%s”; bands are as wide as the heat they carry.", n.load().Name))
}

// balanceHeight is the height of the heat balance picture, mm.
const balanceHeight = 80.0

// bodyHeight is the height of the picture of a body, mm: long ones lie low.
func bodyHeight(b casefile.Body) float64 {
	if b.Kind == "pipe" || b.Axis == "horizontal" {
		return 80
	}
	return 104
}

func (n *note) scene(s drawing.Scene, caption string) {
	d := n.d
	d.Need(s.H + 10)
	d.Scene(s, n.left()+(n.width()-s.W)/2, d.Y)
	d.Y += s.H + 1
	d.Para(pdf.T(caption), smallStyle, n.left(), n.width())
	d.Y += 4
}
