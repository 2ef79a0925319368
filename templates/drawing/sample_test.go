package drawing

import (
	"stillair/checks"
	"stillair/checks/casefile"
)

func q(si float64) casefile.Quantity { return casefile.Quantity{SI: si, Set: true} }

func celsius(c float64) float64 { return c + 273.15 }

func layer(material string, t float64) casefile.Layer {
	return casefile.Layer{Material: material, Thickness: q(t)}
}

// outcome wraps a body in an outcome whose faces have the given temperatures
// in °C, in the order of draft.faces.
func outcome(b casefile.Body, faces ...float64) *checks.Outcome {
	l := checks.LoadOutcome{Name: "as described", Status: checks.Converged}
	l.Case = casefile.Case{Units: "SI", Body: b, Surroundings: casefile.Surroundings{Air: q(celsius(40))}}
	d := &draft{load: &l, body: &l.Case.Body}
	for i, f := range d.faces() {
		if i < len(faces) {
			l.Temps = append(l.Temps, checks.Temp{At: f, Kind: "outer surface", K: celsius(faces[i])})
		}
	}
	return &checks.Outcome{Loads: []checks.LoadOutcome{l}}
}

// samples are bodies of everyday proportions, one of each kind and variety.
func samples() map[string]*checks.Outcome {
	steel := layer("carbon steel", 0.004)
	wool := layer("mineral wool, pipe section", 0.05)
	list := map[string]*checks.Outcome{}

	box := casefile.Body{Kind: "box", Width: q(0.6), Height: q(0.8), Depth: q(0.25), Covered: map[string]string{"back": "wall"}, Wall: &steel}
	o := outcome(box, 53.3, 58.8, 54.1, 54.0, 61.2, 47.5)
	o.Loads[0].Case.Surroundings.Sun = map[string]casefile.Quantity{"front": q(700), "top": q(650)}
	o.Loads[0].Temps[1].K = 0
	o.Loads[0].Temps = append(o.Loads[0].Temps[:1], o.Loads[0].Temps[2:]...)
	o.Loads[0].Temps = append(o.Loads[0].Temps, checks.Temp{At: "inside air", Kind: "air", K: celsius(64)})
	list["box"] = o

	flat := casefile.Body{Kind: "box", Width: q(2), Height: q(0.03), Depth: q(0.4)}
	list["box_flat"] = outcome(flat, 53, 58, 54, 54, 61, 47)
	list["box_flat"].Loads[0].Case.Surroundings.Sun = map[string]casefile.Quantity{"left": q(700), "top": q(650)}
	list["box_tall"] = outcome(casefile.Body{Kind: "box", Width: q(0.1), Height: q(2.2), Depth: q(0.02)}, 53, 58, 54, 54, 61, 47)
	list["box_us"] = outcome(casefile.Body{Kind: "box", Width: q(24 * .0254), Height: q(30 * .0254), Depth: q(8.5 * .0254)}, 53, 58, 54, 54, 61, 47)
	list["box_us"].Loads[0].Case.Units = "US"
	list["box_layers"] = outcome(casefile.Body{Kind: "box", Width: q(0.6), Height: q(0.4), Depth: q(0.5), Layers: []casefile.Layer{wool}}, 43, 45, 44, 44, 47, 41)

	list["plate"] = outcome(casefile.Body{Kind: "plate", Width: q(0.3), Height: q(0.4), Tilt: q(0.52), Wall: &steel}, 80, 85)
	list["plate_wide"] = outcome(casefile.Body{Kind: "plate", Width: q(1.5), Height: q(0.4), Tilt: q(-0.3), Covered: map[string]string{"back": "neighbour"}, Layers: []casefile.Layer{wool}}, 80)
	list["plate_level"] = outcome(casefile.Body{Kind: "plate", Width: q(0.5), Height: q(0.4), Tilt: q(1.5708)}, 80, 85)
	list["plate_upright"] = outcome(casefile.Body{Kind: "plate", Width: q(0.02), Height: q(0.4)}, 80, 85)

	list["cylinder_lying"] = outcome(casefile.Body{Kind: "cylinder", Diameter: q(0.4), Length: q(1), Axis: "horizontal", Wall: &steel}, 80, 75, 76)
	list["cylinder_standing"] = outcome(casefile.Body{Kind: "cylinder", Diameter: q(0.4), Length: q(0.8), Axis: "vertical", Covered: map[string]string{"bottom": "floor"}}, 80, 75)
	list["cylinder_disc"] = outcome(casefile.Body{Kind: "cylinder", Diameter: q(0.8), Length: q(0.02), Axis: "vertical"}, 80, 75, 70)
	list["pipe"] = outcome(casefile.Body{Kind: "pipe", Diameter: q(0.0603), Length: q(1), Axis: "horizontal", Wall: &steel, Layers: []casefile.Layer{wool, layer("aluminium jacket", 0.0006)}}, 47)
	list["pipe"].Loads[0].Temps = append(list["pipe"].Loads[0].Temps, checks.Temp{At: "contents", Kind: "contents", K: celsius(184)})
	list["pipe_bare"] = outcome(casefile.Body{Kind: "pipe", Diameter: q(0.114), Length: q(1), Axis: "vertical"}, 147)
	list["sphere"] = outcome(casefile.Body{Kind: "sphere", Diameter: q(0.6), Wall: &steel, Layers: []casefile.Layer{wool, layer("calcium silicate", 0.03)}}, 52)
	list["sphere_bare"] = outcome(casefile.Body{Kind: "sphere", Diameter: q(0.05)}, 52)
	list["vessel_standing"] = outcome(casefile.Body{Kind: "vessel", Diameter: q(1.6), Length: q(3), Axis: "vertical", Wall: &steel, Layers: []casefile.Layer{wool}}, 52, 55, 49)
	list["vessel_standing"].Loads[0].Case.Surroundings.Sun = map[string]casefile.Quantity{"top head": q(900)}
	list["vessel_lying"] = outcome(casefile.Body{Kind: "vessel", Diameter: q(1.6), Length: q(5), Axis: "horizontal"}, 152, 155, 149)
	list["vessel_flat"] = outcome(casefile.Body{Kind: "vessel", Diameter: q(1.6), Length: q(1.2), Axis: "vertical", Heads: "flat", Layers: []casefile.Layer{wool}}, 52, 55, 49)
	return list
}

// shed gives every face of a sample convection and radiation in the given
// proportions, and the source that makes up for them.
func shed(o *checks.Outcome, watts ...float64) *checks.Outcome {
	l := &o.Loads[0]
	d := &draft{load: l, body: &l.Case.Body}
	total := 0.0
	for i, f := range d.faces() {
		if i >= len(watts) || watts[i] == 0 {
			continue
		}
		l.Heat = append(l.Heat,
			checks.HeatPath{From: f, To: "air", By: "convection", W: 0.45 * watts[i], Final: true},
			checks.HeatPath{From: f, To: "surroundings", By: "radiation", W: 0.55 * watts[i], Final: true})
		total += watts[i]
	}
	for f, s := range l.Case.Surroundings.Sun {
		w := s.SI * 0.05
		l.Heat = append(l.Heat, checks.HeatPath{From: "sun", To: f, By: "sun", W: w})
		total -= w
	}
	if l.Case.Contents.Set {
		return o
	}
	l.Heat = append(l.Heat, checks.HeatPath{From: "heat", To: "inside air", By: "source", W: total})
	return o
}

// balances are outcomes with heat paths.
func balances() map[string]*checks.Outcome {
	s := samples()
	list := map[string]*checks.Outcome{}
	list["box"] = shed(s["box"], 90, 0, 40, 40, 75, 12)
	list["box_six"] = shed(s["box_us"], 90, 80, 40, 40, 75, 1.5)
	list["pipe"] = s["pipe"]
	list["pipe"].Loads[0].Case.Contents = q(celsius(184))
	shed(list["pipe"], 77)
	list["vessel_cold"] = s["vessel_standing"]
	list["vessel_cold"].Loads[0].Case.Contents = q(celsius(-20))
	list["vessel_cold"].Loads[0].Case.Surroundings.Sun = nil
	shed(list["vessel_cold"], -600, -120, -100)
	list["plate"] = shed(s["plate"], 30, 20)
	return list
}
