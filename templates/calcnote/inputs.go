package calcnote

import (
	"fmt"
	"slices"
	"strings"

	"stillair/checks/casefile"
	"stillair/checks/limit"
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
	var rows []pdf.Row
	for _, b := range n.boundaries() {
		rows = append(rows, cells(b.what, b.state, b.how))
	}
	n.partTable("What is included and what is not", "", []pdf.Column{{Head: "Effect", Width: 44}, {Head: "Included", Width: 22}, {Head: "How, or what is taken instead", Width: 104}}, rows)
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
	if n.loadsWith(coveredNeighbour) != "" {
		list[5].how = "Only the radiant temperature given; covered neighbours shed no heat."
	}
	if b := n.o.Loads[0].Case.Body; b.Wall != nil || len(b.Layers) > 0 {
		list[2] = boundary{list[2].what, yes, "Fourier's law, layer by layer, across the layers only."}
	}
	if names := n.loadsWith(func(c casefile.Case) bool { return len(c.Surroundings.Sun) > 0 }); names != "" {
		list[4] = boundary{"Sun", yes, "Irradiance per face as typed, times the solar absorptance; in load case " + names + "."}
	}
	if names := n.loadsWith(func(c casefile.Case) bool { return len(c.Surroundings.Sees) > 0 }); names != "" {
		how := "Single faces see a radiant temperature of their own; in load case " + names + "."
		if n.loadsWith(coveredNeighbour) != "" {
			how += " Covered neighbours shed no heat."
		}
		list[5] = boundary{list[5].what, "in part", how}
	}
	if names := n.loadsWith(func(c casefile.Case) bool { return c.Surroundings.Humidity.Set }); names != "" {
		list[6] = boundary{list[6].what, yes, "Dew point of the air around, compared with the faces; in load case " + names + "."}
	}
	return list
}

// coveredNeighbour tells whether a face stands against a neighbour.
func coveredNeighbour(c casefile.Case) bool {
	for _, reason := range c.Body.Covered {
		if reason == "neighbour" {
			return true
		}
	}
	return false
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
	n.text("Each input as typed, its value in SI units as the calculation uses it, and its source. Rows marked A are values taken by default.")
	var rows []pdf.Row
	for _, in := range n.o.File.Inputs {
		rows = append(rows, n.inputRow(in))
	}
	n.table([]pdf.Column{{Head: "", Width: 5}, {Head: "Input", Width: 54}, {Head: "As typed", Width: 31}, {Head: "SI value", Width: 36}, {Head: "Source", Width: 46}}, rows)
	n.changes()
	n.limitList()
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
	r := cells(mark, in.Label, in.Typed, siOf(in), n.refs.sourceMark(in.Source))
	r.Cells[0].Face = pdf.Bold
	r.Shade = in.Assumption
	return r
}

// siOf is the SI value of an input; words have none.
func siOf(in casefile.Input) string {
	if in.SI == in.Typed && !strings.ContainsAny(in.SI, "0123456789") {
		return ""
	}
	return minus(powers(in.SI))
}

// purposes says what the purpose of a load case decides.
const purposes = "The purpose of a load case decides which limits are judged in it. touch: burn thresholds and touch limits, and highest temperatures and rises of faces; " +
	"component: every limit but those on touch and condensation; loss: none, the heat shed is what counts; condensation: the dew point and lowest temperatures. " +
	"Without a purpose all limits are judged, the dew point where the humidity is given. A radiant temperature that is not typed follows the air temperature of its load case."

// changes lists what each load case changes.
func (n *note) changes() {
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
			rows = append(rows, cells(name, purpose, c.Label, c.Typed, siOf(c)))
		}
	}
	n.partTable("Load cases", purposes, []pdf.Column{{Head: "Load case", Width: 34}, {Head: "Purpose", Width: 28}, {Head: "Changes", Width: 50}, {Head: "To", Width: 32}, {Head: "SI value", Width: 26}}, rows)
}

// limitList lists the limits as the case gives them.
func (n *note) limitList() {
	var rows []pdf.Row
	for _, l := range n.o.Loads[0].Case.Limits {
		rows = append(rows, cells(l.At, limitWords(l), l.Contact.Typed, n.limitSource(l)))
	}
	if len(rows) == 0 {
		n.part("Limits", 8)
		n.text("No limit is given.")
		return
	}
	n.partTable("Limits", "", []pdf.Column{{Head: "Place", Width: 24}, {Head: "Limit", Width: 58}, {Head: "Contact", Width: 18}, {Head: "Source or reason", Width: 70}}, rows)
}

// limitWords is a limit of the case in words.
func limitWords(l casefile.Limit) string {
	switch {
	case l.NoCondensation:
		return "no condensation"
	case l.Touch != "":
		return "burn threshold, " + l.Touch
	case l.Rule != "":
		e, _ := limit.Find(l.Rule)
		return e.Text()
	case l.Most.Set:
		return "at most " + minus(l.Most.Typed)
	case l.Least.Set:
		return "at least " + minus(l.Least.Typed)
	}
	return "rise over the air of at most " + l.Rise.Typed
}

// limitSource is where a limit comes from: typed, or that of the verdicts.
func (n *note) limitSource(l casefile.Limit) string {
	parts := nonEmpty(l.Source, l.Why)
	switch {
	case l.Touch != "":
		if t, err := limit.Touch(l.Touch, l.Contact.SI); err == nil {
			parts = append([]string{shortSource(t.Source) + " " + n.refs.marks(t.Source)}, parts...)
		}
	case l.Rule != "":
		e, _ := limit.Find(l.Rule)
		parts = append([]string{e.Standard}, parts...)
	case l.NoCondensation:
		parts = append([]string{"dew point of the air around"}, parts...)
	case l.Source == "":
		parts = append([]string{"project limit"}, parts...)
	}
	return strings.Join(parts, ": ")
}

// pictures are the body to scale and its heat balance.
func (n *note) pictures() {
	wanted := bodyHeight(n.load().Case.Body)
	intro := fmt.Sprintf("The body and its mean face temperatures in the governing load case, “%s”.", n.load().Name)
	n.sectionRoom("The body and where its heat goes", 11+n.d.ParaHeight(pdf.T(intro), bodyStyle, measure)+leastPicture*wanted+captionRoom)
	n.text(intro)
	body := n.pictureHeight(wanted, leastPicture)
	n.scene(drawing.Body(n.o, n.gov, n.width(), body), "The body; scale and unit of the dimensions as stated in the picture.")
	n.scene(drawing.HeatBalance(n.o, n.gov, n.width(), n.pictureHeight(balanceHeight, leastPicture)),
		fmt.Sprintf("Heat balance of the governing load case, “%s”; bands are as wide as the heat they carry.", n.load().Name))
}

// Sizes of pictures, mm: the height of the heat balance, the room a caption
// takes, and the share of its height to which a picture may shrink to stay on
// its page.
const (
	balanceHeight = 78.0
	captionRoom   = 9.0
	leastPicture  = 0.6
)

// bodyHeight is the height of the picture of a body, mm: long ones lie low.
func bodyHeight(b casefile.Body) float64 {
	if b.Kind == "pipe" || b.Axis == "horizontal" {
		return 78
	}
	return 95
}

// pictureHeight fits a picture into what is left of the page when that is at
// least a share of what is wanted.
func (n *note) pictureHeight(wanted, least float64) float64 {
	left := n.d.Bottom() - n.d.Y - captionRoom
	if left < wanted && left >= least*wanted {
		return left
	}
	return wanted
}

// scene draws a picture with its caption on one page.
func (n *note) scene(s drawing.Scene, caption string) {
	d := n.d
	d.Need(s.H + captionRoom)
	d.Scene(withMinus(s), n.left()+(n.width()-s.W)/2, d.Y)
	d.Y += s.H + 0.5
	n.caption(caption, n.left(), n.width())
	d.Y += 2
}

// caption numbers a figure.
func (n *note) caption(text string, x, w float64) {
	n.figures++
	n.d.Para(pdf.T(fmt.Sprintf("Figure\u00A0%d  %s", n.figures, text)), smallStyle, x, w)
	n.d.Y += 1
}

// withMinus is a picture with the minus sign of the note in its labels.
func withMinus(s drawing.Scene) drawing.Scene {
	items := slices.Clone(s.Items)
	for i, it := range items {
		if label, ok := it.(drawing.Label); ok {
			label.Text = minus(label.Text)
			items[i] = label
		}
	}
	s.Items = items
	return s
}
