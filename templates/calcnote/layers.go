package calcnote

import (
	"fmt"
	"math"
	"strings"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/material"
	"stillair/geometry"
	"stillair/templates/pdf"
)

// layersWorked substitutes the conduction through the wall and layers of the
// face that carries the most heat.
func (n *note) layersWorked() {
	c := n.load().Case
	all := layersOf(c.Body)
	if len(all) == 0 {
		return
	}
	part, ok := n.busiest(c.Body)
	if !ok || len(part.Slabs) != len(all) {
		return
	}
	paths := conduction(n.load().Heat, part.Face.Name)
	if len(paths) != len(all) {
		return
	}
	n.part(fmt.Sprintf("%s: wall and layers", capital(part.Face.Name)), 34)
	n.runs(pdf.Run{Text: "The heat that reaches this face, "}, inline(`Q = \bar{k}\,S \left(T_1 - T_2\right)`), pdf.Run{Text: " for each layer:"})
	var rows []pdf.Row
	for i, l := range all {
		rows = append(rows, n.layerRow(l, part.Slabs[i], paths[i], n.smallestStep(paths)))
	}
	n.table([]pdf.Column{
		{Head: "Layer, from the inside", Width: 50}, {Head: "t / mm", Width: 15, Align: pdf.AlignDecimal}, {Head: "S / m", Width: 20, Align: pdf.AlignDecimal},
		{Head: "k mean / W/(m·K)", Width: 22, Align: pdf.AlignDecimal}, {Head: "T₁ / K", Width: 22, Align: pdf.AlignDecimal},
		{Head: "T₂ / K", Width: 22, Align: pdf.AlignDecimal}, {Head: "Q / W", Width: 18, Align: pdf.AlignDecimal}}, rows)
}

// smallestStep is the smallest temperature step over the layers, K; it sets
// the decimals of the table.
func (n *note) smallestStep(paths []checks.HeatPath) float64 {
	least := 1.0
	for _, h := range paths {
		t1, ok1 := n.tempAt(h.From)
		t2, ok2 := n.tempAt(h.To)
		if step := math.Abs(t1 - t2); ok1 && ok2 && step > 0 {
			least = math.Min(least, step)
		}
	}
	return least
}

func (n *note) layerRow(l casefile.Layer, s geometry.Slab, h checks.HeatPath, step float64) pdf.Row {
	t1, ok1 := n.tempAt(h.From)
	t2, ok2 := n.tempAt(h.To)
	row := cells(layerName(l), plainDigits(1000*s.Thickness, 4), plainDigits(s.Factor(), 6), notComputed, notComputed, notComputed, plainDigits(h.W, 5))
	if !ok1 || !ok2 {
		return row
	}
	row.Cells[4], row.Cells[5] = pdf.C(kelvin(t1, step)), pdf.C(kelvin(t2, step))
	if l.Conductivity.Set {
		row.Cells[3] = pdf.C(plainDigits(l.Conductivity.SI, 5))
	} else if m, ok := material.Find(l.Material); ok {
		row.Cells[3] = pdf.C(plainDigits(m.Mean(t1, t2), 5))
	}
	return row
}

// kelvin prints a temperature with enough decimals for a difference of four
// significant digits.
func kelvin(k, diff float64) string {
	decimals := 3
	if d := math.Abs(diff); d > 0 && d < 1 {
		decimals = min(9, 3-int(math.Floor(math.Log10(d))))
	}
	return fmt.Sprintf("%.*f", decimals, k)
}

func (n *note) tempAt(at string) (float64, bool) {
	for _, t := range n.load().Temps {
		if t.At == at {
			return t.K, true
		}
	}
	return 0, false
}

func layersOf(b casefile.Body) []casefile.Layer {
	var list []casefile.Layer
	if b.Wall != nil {
		list = append(list, *b.Wall)
	}
	return append(list, b.Layers...)
}

func layerName(l casefile.Layer) string {
	if l.Material != "" {
		return l.Material
	}
	return "layer, k as typed"
}

// conduction lists the conduction paths of a face from the inside out.
func conduction(heat []checks.HeatPath, face string) []checks.HeatPath {
	var list []checks.HeatPath
	for _, h := range heat {
		if h.By == "conduction" && (h.To == face || strings.HasPrefix(h.To, face+", between")) {
			list = append(list, h)
		}
	}
	return list
}

// busiest is the part of the body whose face sheds the most heat.
func (n *note) busiest(b casefile.Body) (geometry.Part, bool) {
	var best geometry.Part
	most, found := -1.0, false
	for _, p := range partsOf(b) {
		w := 0.0
		for _, h := range conduction(n.load().Heat, p.Face.Name) {
			w = math.Abs(h.W)
		}
		if w > most {
			best, most, found = p, w, true
		}
	}
	return best, found
}

// partsOf makes the faces and layers of the body as the calculation does.
func partsOf(b casefile.Body) []geometry.Part {
	var s geometry.Stack
	if b.Wall != nil {
		s.Wall = b.Wall.Thickness.SI
	}
	for _, l := range b.Layers {
		s.Layers = append(s.Layers, l.Thickness.SI)
	}
	lying := b.Axis == "horizontal"
	switch b.Kind {
	case "plate":
		return geometry.Plate(b.Width.SI, b.Height.SI, b.Tilt.SI*180/math.Pi, s)
	case "box":
		return geometry.Box(b.Width.SI, b.Height.SI, b.Depth.SI, s)
	case "cylinder":
		return geometry.Cylinder(b.Diameter.SI, b.Length.SI, lying, true, s)
	case "pipe":
		return geometry.Cylinder(b.Diameter.SI, b.Length.SI, lying, false, s)
	case "vessel":
		return geometry.Vessel(b.Diameter.SI, b.Length.SI, lying, b.Heads == "dished", s)
	}
	return geometry.Ball(b.Diameter.SI, s)
}
