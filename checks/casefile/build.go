package casefile

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"
	"time"

	"stillair/checks/material"
	"stillair/checks/unit"
	"stillair/radiation"
)

// builder makes one Case of a tree whose form was checked, and reports what
// does not fit together.
type builder struct {
	r      *reader
	root   *value
	c      Case
	inputs []Input
	found  []misfit // kept back, since load cases share most of them
}

// misfit is a finding about values that do not fit together.
type misfit struct {
	code, path string
	at         place
	f          Finding
	causes     []string // paths of what may have caused it, beside its own
	always     bool     // counts only when every load case has it
}

func newBuilder(r *reader, root *value) *builder { return &builder{r: r, root: root} }

// add keeps a finding. In a load case it is told at the first of path and
// causes that the load case types.
func (b *builder) add(code string, at place, path string, f Finding, causes ...string) {
	b.found = append(b.found, misfit{code: code, path: path, at: at, f: f, causes: causes})
}

func (b *builder) build() {
	b.required(b.root, description, b.top(), "")
	b.head()
	b.surroundings()
	b.body()
	b.drive()
	b.insideOfBox()
	b.methods()
	b.uncertainty()
	b.outside()
	b.sunOnUnknown()
	b.limits()
}

// top is where something missing from the whole case is reported.
func (b *builder) top() place {
	for _, p := range b.root.pairs {
		if p.at.line > 0 {
			return p.at
		}
	}
	return place{1, 1, 1}
}

func (b *builder) head() {
	t := b.root.textOf
	n := b.root.get("note")
	b.c.Title, b.c.Tag = t("title"), t("tag")
	b.c.Note = Note{Number: n.textOf("number"), Revision: n.textOf("revision"), Project: n.textOf("project"), Client: n.textOf("client"),
		Status: n.textOf("status"), Prepared: n.textOf("prepared"), Checked: n.textOf("checked"), Approved: n.textOf("approved"),
		Date: n.textOf("date"), Reason: n.textOf("reason"), Purpose: n.textOf("purpose"), Owner: n.textOf("owner")}
	b.noteDate(n.get("date"))
	b.c.Units = t("units")
	if b.c.Units == "" {
		b.c.Units = description.part("units").usual
	}
	if v := b.root.get("remarks"); v != nil && !v.bad {
		for _, item := range v.items {
			if item.shape == scalar && !item.bad {
				b.c.Remarks = append(b.c.Remarks, strings.TrimSpace(item.text))
			}
		}
	}
}

// quantity reads a value or its default, and lists it among the inputs. A
// missing value without default gives an unset quantity.
func (b *builder) quantity(in *input, v *value, path string) Quantity {
	q := Quantity{Typed: in.usual, Source: "default: " + in.why, Set: true}
	switch {
	case v != nil && (v.bad || v.shape != scalar):
		return Quantity{}
	case v != nil:
		q.Typed, q.Line, q.Source = v.text, v.at.line, ""
		if v.setting {
			q.Source = "setting"
		}
	case in.usual == "":
		return Quantity{}
	}
	si, err := unit.Parse(q.Typed, in.kind)
	if err != nil {
		return Quantity{}
	}
	q.SI = si
	b.list(Input{Path: path, Label: labelOf(in, path), Typed: q.Typed, SI: plainSI(in.kind, si), Source: q.origin(), Assumption: q.Line == 0})
	return q
}

func (b *builder) list(i Input) { b.inputs = append(b.inputs, i) }

// origin is the source of a quantity for the input table.
func (q Quantity) origin() string {
	if q.Source != "" {
		return q.Source
	}
	return "case file " + lineWord(q.Line)
}

func (v *value) source() string {
	if v.setting {
		return "setting"
	}
	return "case file " + lineWord(v.at.line)
}

// plainSI writes a value in the coherent SI unit with six digits.
func plainSI(k unit.Kind, si float64) string {
	digits := strconv.FormatFloat(si, 'g', 6, 64)
	if strings.Contains(digits, "e+") {
		digits = strconv.FormatFloat(si, 'f', -1, 64)
	}
	if u := k.SIUnit(); u != "" {
		return digits + unit.NoBreak + u
	}
	return digits
}

// labelOf names an input for the note: "width of the box", "sun on top",
// "thickness of layer 2".
func labelOf(in *input, path string) string {
	parts := strings.Split(path, ".")
	last := parts[len(parts)-1]
	switch {
	case len(parts) > 1 && slices.Contains(allFaces, last):
		return in.label + " " + last
	case len(parts) == 4 && parts[0] == "body":
		return in.label + " of " + strings.NewReplacer("layers[", "layer ", "]", "", "wall", "the wall").Replace(parts[2])
	case len(parts) == 3 && parts[0] == "body":
		return in.label + " of the " + parts[1]
	}
	return in.label
}

func (b *builder) surroundings() {
	v := b.root.get("surroundings")
	s := &b.c.Surroundings
	read := func(in *input) Quantity { return b.quantity(in, v.get(in.key), "surroundings."+in.key) }
	s.Air = read(air)
	if s.Radiant = read(radiant); v.get("radiant") == nil {
		b.radiantAsAir()
	}
	s.Sees = b.perFace(sees, v.get("sees"), "surroundings.sees")
	s.Sun = b.perFace(sun, v.get("sun"), "surroundings.sun")
	s.Pressure = read(pressure)
	if v.get("pressure") == nil {
		s.Altitude = read(altitude)
	} else if a := v.pair("altitude"); a != nil {
		b.add("E-402", a.at, "surroundings.altitude", Finding{Message: "altitude and pressure are both given", Found: "altitude beside pressure",
			Expected: "one of them", Help: "pressure is the absolute pressure of the air; altitude gives it by the standard atmosphere"})
	}
	s.Humidity = read(humidity)
}

// radiantAsAir is the default of the radiant temperature. It follows the air of
// each load case, so one number for all would mislead.
func (b *builder) radiantAsAir() {
	s := &b.c.Surroundings
	if s.Air.Set {
		s.Radiant = Quantity{SI: s.Air.SI, Typed: s.Air.Typed, Source: "air temperature", Set: true}
	}
	line := Input{Path: "surroundings.radiant", Label: radiant.label, Typed: "as the air", Assumption: true}
	switch {
	case b.root.get("loads") != nil:
		line.SI, line.Source = "the air temperature of each load case", "default: the air temperature of each load case"
	case s.Air.Set:
		line.SI, line.Source = plainSI(unit.Temperature, s.Air.SI), "default: the air temperature"
	default:
		return
	}
	b.list(line)
}

// perFace reads a quantity for each face of the body that is named.
func (b *builder) perFace(in *input, v *value, path string) map[string]Quantity {
	all := map[string]Quantity{}
	for _, p := range v.children() {
		if b.noFace(p, path) {
			continue
		}
		if q := b.quantity(in.each, p.value, join(path, p.key)); q.Set {
			all[p.key] = q
		}
	}
	return all
}

// noFace reports a face that the case names and that a load case, by turning
// the axis, takes away.
func (b *builder) noFace(p pair, path string) bool {
	if slices.Contains(b.r.faces, p.key) {
		return false
	}
	b.add("E-305", p.at, join(path, p.key), Finding{Message: fmt.Sprintf("the body has no face %s", quote(p.key)),
		Found: quote(p.key), Expected: "one of " + oneOf(b.r.faces)}, b.bodyPath("axis"))
	return true
}

func (b *builder) body() {
	kind, axisWord := bodyOf(b.root)
	if kind == "" {
		b.noBody()
		return
	}
	in, path := body.part(kind), "body."+kind
	p := b.root.get("body").pair(kind)
	v := p.value
	if v.shape == mapping {
		b.required(v, in, p.at, path)
	}
	read := func(key string) Quantity {
		if part := in.part(key); part != nil {
			return b.quantity(part, v.get(key), join(path, key))
		}
		return Quantity{}
	}
	b.c.Body = Body{Kind: kind, Width: read("width"), Height: read("height"), Depth: read("depth"),
		Diameter: read("diameter"), Length: read("length"), Tilt: read("tilt"), Axis: axisWord,
		Heads: b.choice(in.part("heads"), v.get("heads"), join(path, "heads"))}
	b.choice(in.part("axis"), v.get("axis"), join(path, "axis"))
	b.covers(in, v, path)
	b.solids(v, path)
	b.wallFits(v, path)
}

// bodyPath is the path of an input of the body.
func (b *builder) bodyPath(key string) string {
	kind, _ := bodyOf(b.root)
	return "body." + kind + "." + key
}

func (b *builder) noBody() {
	v := b.root.pair("body")
	if v == nil || v.value.bad || v.value.shape != mapping {
		return
	}
	for k := range v.value.meant {
		if k != "" {
			return
		}
	}
	b.add("E-207", v.at, "body", Finding{Message: "the kind of body is missing", Found: "no body", Expected: "exactly one of " + oneOf(bodyKinds)})
}

// choice reads a word or its default.
func (b *builder) choice(in *input, v *value, path string) string {
	if in == nil || v != nil && (v.bad || v.shape != scalar) {
		return ""
	}
	line := Input{Path: path, Label: labelOf(in, path), Typed: in.usual, SI: in.usual, Source: "default: " + in.why, Assumption: true}
	if v != nil {
		line.Typed, line.SI, line.Source, line.Assumption = v.text, v.text, v.source(), v.setting
	}
	if line.Typed != "" {
		b.list(line)
	}
	return line.Typed
}

// covers reads the faces that shed no heat.
func (b *builder) covers(in *input, v *value, path string) {
	b.c.Body.Covered = map[string]string{}
	faces := in.part("faces")
	if faces == nil {
		return
	}
	for _, p := range v.get("faces").children() {
		if b.noFace(p, join(path, "faces")) {
			continue
		}
		state := b.choice(faces.each, p.value, join(path, "faces."+p.key))
		if state != "" && state != free {
			b.c.Body.Covered[p.key] = state
			b.coveredInSun(p.key)
		}
	}
	if len(b.c.Body.Covered) == len(b.r.faces) {
		b.add("E-413", v.pair("faces").at, join(path, "faces"), Finding{Message: "every face is covered, so no heat can leave", Found: "no free face", Expected: "at least one face that sheds heat"})
	}
}

// coveredInSun warns about surroundings of a face that does not see them.
func (b *builder) coveredInSun(face string) {
	for _, what := range []string{"sun", "sees"} {
		path := "surroundings." + what
		p := b.root.path(path).pair(face)
		if p == nil || p.value.bad {
			continue
		}
		b.add("E-505", p.at, join(path, face), Finding{Message: fmt.Sprintf("%s is given for %s, a covered face, and has no effect", what, face),
			Found: what + " on a covered face", Expected: "a free face"}, b.bodyPath("faces."+face))
	}
}

// solids reads wall and layers.
func (b *builder) solids(v *value, path string) {
	if w := v.get("wall"); w != nil && w.shape == mapping {
		layer := b.layer(w, v.pair("wall").at, join(path, "wall"))
		b.c.Body.Wall = &layer
	}
	if l := v.get("layers"); l != nil && !l.bad {
		for i, item := range l.items {
			at := itemPath(join(path, "layers"), i)
			if item.shape != mapping {
				continue
			}
			b.required(item, layers.each, item.at, at)
			b.c.Body.Layers = append(b.c.Body.Layers, b.layer(item, item.at, at))
		}
	}
}

func (b *builder) layer(v *value, at place, path string) Layer {
	part := func(key string) (*input, *value, string) {
		return wall.part(key), v.get(key), join(path, key)
	}
	l := Layer{Material: v.textOf("material")}
	l.Thickness = b.quantity(part("thickness"))
	l.Conductivity = b.quantity(part("conductivity"))
	typed := v.get("material")
	switch {
	case v.get("conductivity") != nil:
		b.choice(part("material"))
	case typed != nil && !typed.bad && l.Material != "":
		l.Material = b.catalogueMaterial(typed, join(path, "material"))
	case typed == nil && !v.meant["material"] && !v.meant["conductivity"] || typed != nil && !typed.bad:
		b.add("E-411", at, path, Finding{Message: path + " has neither a material nor a conductivity", Found: "no material",
			Expected: "material: " + wall.part("material").example + ", or conductivity: 0.05 W/(m·K)"})
	}
	return l
}

// catalogueMaterial finds a material by name and lists what the table gives.
func (b *builder) catalogueMaterial(v *value, path string) string {
	m, ok := material.Find(v.text)
	if !ok {
		f := materials.unknown(v.text, wall.part("material").example)
		f.Expected += "; or a conductivity beside it"
		b.add("E-307", v.at, path, f)
		return v.text
	}
	if m.Confidence == "low" {
		b.add("E-503", v.at, path, Finding{Message: "the conductivity of " + m.Name + " rests on sources of low confidence", Found: quote(v.text),
			Expected: "a conductivity from the maker", Help: "sources: " + m.Source})
	}
	b.list(Input{Path: path, Label: labelOf(wall.part("material"), path), Typed: v.text, SI: conductivityText(m),
		Source: fmt.Sprintf("material table: %s (confidence %s)", m.Source, m.Confidence)})
	return m.Name
}

func conductivityText(m material.Material) string {
	first, last := m.Points[0], m.Points[len(m.Points)-1]
	text := fmt.Sprintf("%s: %s W/(m·K) at %s", m.Name, number(first.K), unit.SI.Show(unit.Temperature, first.T, 0))
	if len(m.Points) > 1 {
		text += fmt.Sprintf(" to %s W/(m·K) at %s", number(last.K), unit.SI.Show(unit.Temperature, last.T, 0))
	}
	return text
}

func number(x float64) string { return strconv.FormatFloat(x, 'g', 4, 64) }

// wallFits wants room inside the wall.
func (b *builder) wallFits(v *value, path string) {
	w := b.c.Body.Wall
	if w == nil || !w.Thickness.Set {
		return
	}
	least := math.Inf(1)
	for _, q := range []Quantity{b.c.Body.Width, b.c.Body.Height, b.c.Body.Depth, b.c.Body.Diameter} {
		if q.Set {
			least = min(least, q.SI)
		}
	}
	if w.Thickness.SI < least/2 {
		return
	}
	t := v.path("wall.thickness")
	b.add("E-403", t.at, path+".wall.thickness", Finding{Message: "the wall is thicker than half of the body", Found: t.text,
		Expected: "less than " + unit.SI.Show(unit.Length, least/2, 1), Help: "the wall lies within the outside size of the bare body; layers lie outside"},
		join(path, "width"), join(path, "height"), join(path, "depth"), join(path, "diameter"))
}

// drive wants exactly one of heat and contents.
func (b *builder) drive() {
	h, t := b.root.pair("heat"), b.root.pair("contents")
	b.c.Heat = b.quantity(heat, b.root.get("heat"), "heat")
	b.c.Contents = b.quantity(contents, b.root.get("contents"), "contents")
	switch {
	case h != nil && t != nil:
		later := h
		if t.at.line > h.at.line {
			later = t
		}
		b.add("E-401", later.at, later.key, Finding{Message: "heat and contents are both given", Found: "heat beside contents", Expected: "one of them",
			Help: "heat is what the body must shed; contents is the temperature it is held at"})
	case h == nil && t == nil && !b.root.meant["heat"] && !b.root.meant["contents"]:
		b.add("E-208", b.top(), "heat", Finding{Message: "neither heat nor contents is given", Found: "neither", Expected: "heat: 250 W or contents: 184 °C"})
	}
}

// noteDate refuses a date that no calendar has.
func (b *builder) noteDate(v *value) {
	if v == nil || v.bad || v.shape != scalar || strings.TrimSpace(v.text) == "" {
		return
	}
	if _, err := time.Parse(time.DateOnly, strings.TrimSpace(v.text)); err != nil {
		b.add("E-303", v.at, "note.date", Finding{Message: "the date of the note is no date", Found: quote(v.text), Expected: "year-month-day, such as 2026-11-30"})
	}
}

func (b *builder) insideOfBox() {
	v := b.root.pair("inside")
	if b.c.Body.Kind == "box" {
		read := func(key string) Quantity {
			return b.quantity(inside.part(key), b.root.get("inside").get(key), "inside."+key)
		}
		b.c.Inside = Inside{Emissivity: read("emissivity"), UpperZone: read("upper zone")}
		return
	}
	if v != nil && b.c.Body.Kind != "" {
		b.add("E-416", v.at, "inside", Finding{Message: "inside is given for a " + b.c.Body.Kind + ", which has no inside air", Found: "inside", Expected: "a box, or no inside"})
	}
}

func (b *builder) methods() {
	b.c.Methods = map[string]string{}
	for _, p := range b.root.get("methods").children() {
		if in := methods.part(p.key); in != nil && !p.value.bad {
			if id := b.choice(in, p.value, "methods."+p.key); id != "" {
				b.c.Methods[p.key] = id
			}
		}
	}
}

func (b *builder) uncertainty() {
	read := func(key string) Quantity {
		return b.quantity(uncertainty.part(key), b.root.get("uncertainty").get(key), "uncertainty."+key)
	}
	b.c.Uncertainty = Uncertainty{Heat: read("heat"), Air: read("air"), Contents: read("contents"), Sun: read("sun"), Humidity: read("humidity"), Correlation: read("correlation"),
		Emissivity: read("emissivity"), Absorptance: read("absorptance"), Inside: read("inside"), UpperZone: read("upper zone"), Conductivity: read("conductivity"), Thickness: read("thickness")}
}

// Half-widths around typed surface properties, stated assumptions.
const (
	typedEmissivity  = 0.05
	typedAbsorptance = 0.10
)

// outside reads emissivity and solar absorptance, typed or from the finish.
func (b *builder) outside() {
	p := b.root.get("body").pair(b.c.Body.Kind)
	if p == nil || p.value.shape != mapping {
		return
	}
	path := "body." + p.key
	f, named := b.finish(p.value.get("finish"), join(path, "finish"))
	b.emissivity(p, f, named, path)
	v := p.value
	typed := b.quantity(absorptance, v.get("absorptance"), join(path, "absorptance"))
	u := b.c.Uncertainty.Absorptance
	switch {
	case typed.Set && u.Set:
		b.c.Body.Absorb = aroundTyped(typed, u.SI)
	case typed.Set:
		b.c.Body.Absorb = aroundTyped(typed, typedAbsorptance)
		b.halfWidth("absorptance", typedAbsorptance)
	case named && f.HasAbsorb:
		b.c.Body.Absorb = ofFinish(f, v.get("finish"), f.AbsorbLow, f.Absorb, f.AbsorbHigh)
		if u.Set {
			b.c.Body.Absorb.around(u.SI)
		}
	}
}

// emissivity reads the typed emissivity or that of the finish; one is needed.
func (b *builder) emissivity(p *pair, f radiation.Finish, named bool, path string) {
	v, u := p.value, b.c.Uncertainty.Emissivity
	typed := b.quantity(emissivity, v.get("emissivity"), join(path, "emissivity"))
	switch {
	case typed.Set && u.Set:
		b.c.Body.Emissivity = aroundTyped(typed, u.SI)
	case typed.Set:
		b.c.Body.Emissivity = aroundTyped(typed, typedEmissivity)
		b.halfWidth("emissivity", typedEmissivity)
	case named:
		b.c.Body.Finish = f.Name
		b.c.Body.Emissivity = ofFinish(f, v.get("finish"), f.Low, f.Typical, f.High)
		if u.Set {
			b.c.Body.Emissivity.around(u.SI)
		}
		b.finishWarnings(f, v.get("finish"), join(path, "finish"))
	case v.get("finish") == nil && v.get("emissivity") == nil && !v.meant["finish"] && !v.meant["emissivity"]:
		b.add("E-410", p.at, path, Finding{Message: "neither a finish nor an emissivity is given", Found: "neither", Expected: "finish: " + finish.example + ", or emissivity: 0.9"})
	}
}

// halfWidth lists the assumed half-width around a typed surface property.
func (b *builder) halfWidth(key string, u float64) {
	in := uncertainty.part(key)
	b.list(Input{Path: "uncertainty." + key, Label: in.label, Typed: number(u), SI: number(u),
		Source: "default: stated assumption around a typed value", Assumption: true})
}

func aroundTyped(q Quantity, u float64) Range {
	r := Range{Typical: q.SI, Typed: q.Typed, Line: q.Line, Set: true,
		Source: fmt.Sprintf("%s, ±%s%s", q.origin(), unit.NoBreak, number(u))}
	r.around(u)
	return r
}

// around sets the ends of a range u from its typical value, within 0..1.
func (r *Range) around(u float64) {
	r.Low, r.High = max(0, r.Typical-u), min(1, r.Typical+u)
}

func ofFinish(f radiation.Finish, v *value, low, typical, high float64) Range {
	return Range{Low: low, Typical: typical, High: high, Typed: v.text, Line: v.at.line, Set: true,
		Source: "finish table: " + f.Source, Confidence: f.Confidence}
}

// finish finds a finish by name and lists what the table gives.
func (b *builder) finish(v *value, path string) (radiation.Finish, bool) {
	if v == nil || v.bad || v.shape != scalar {
		return radiation.Finish{}, false
	}
	f, ok := radiation.FindFinish(v.text)
	if !ok {
		return f, false
	}
	values := fmt.Sprintf("%s: emissivity %s (%s to %s)", f.Name, number(f.Typical), number(f.Low), number(f.High))
	if f.HasAbsorb {
		values += fmt.Sprintf(", solar absorptance %s (%s to %s)", number(f.Absorb), number(f.AbsorbLow), number(f.AbsorbHigh))
	}
	b.list(Input{Path: path, Label: labelOf(finish, path), Typed: v.text, SI: values,
		Source: fmt.Sprintf("finish table: %s (confidence %s)", f.Source, f.Confidence)})
	return f, true
}

func (b *builder) finishWarnings(f radiation.Finish, v *value, path string) {
	if f.Confidence == "low" {
		b.add("E-501", v.at, path, Finding{Message: "the emissivity of " + f.Name + " rests on sources of low confidence", Found: quote(v.text),
			Expected: "a measured emissivity", Help: "sources: " + f.Source})
	}
	if !f.TotalEmissivity() {
		b.add("E-502", v.at, path, Finding{Message: "the emissivity of " + f.Name + " is not a total emissivity", Found: "band: " + bandWord(f.Band),
			Expected: "the total emissivity of the surface", Help: "a heat balance needs the whole thermal spectrum; type emissivity when it is known"})
	}
}

func bandWord(band string) string {
	if band == "" {
		return "not stated"
	}
	return band
}

// sunOnUnknown refuses sun on a surface whose absorptance nobody knows.
func (b *builder) sunOnUnknown() {
	if b.c.Body.Absorb.Set || b.c.Body.Kind == "" {
		return
	}
	v := b.root.get("body").get(b.c.Body.Kind)
	if a, f := v.get("absorptance"), v.get("finish"); a != nil && a.bad || f != nil && f.bad || v.meant["absorptance"] || v.meant["finish"] {
		return
	}
	for _, p := range b.root.path("surroundings.sun").children() {
		_, covered := b.c.Body.Covered[p.key]
		if q, ok := b.c.Surroundings.Sun[p.key]; !ok || q.SI == 0 || covered {
			continue
		}
		b.add("E-409", p.at, "surroundings.sun."+p.key, Finding{Message: "sun is given, but the solar absorptance of the surface is not known",
			Found: "no absorptance", Expected: "absorptance: 0.45 in the body, or a finish that has one"},
			b.bodyPath("finish"), b.bodyPath("emissivity"), b.bodyPath("faces."+p.key))
	}
}
