package table

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks"
	"stillair/checks/unit"
)

// meaning says what a verdict says, in one sentence.
var meaning = map[checks.Verdict]string{
	checks.Pass:            "every calculated result meets its limit, uncertainty included",
	checks.ConditionalPass: "every calculated result meets its limit, but not every one with its uncertainty included",
	checks.ConditionalFail: "a calculated result does not meet its limit, by less than its uncertainty",
	checks.Fail:            "a calculated result does not meet its limit by more than its uncertainty",
	checks.None:            "temperatures only, nothing was judged",
	checks.NotJudged:       "limits are given, but no load case has a purpose that judges one",
	checks.NoResult:        "at least one load case has no valid result",
}

func (p *page) head() {
	c := p.o.Case
	title := clean(c.Title)
	if c.Tag != "" {
		title += "   [" + clean(c.Tag) + "]"
	}
	p.line("%s", title)
	p.sayVerdict("", p.o.Verdict, ": "+meaning[p.o.Verdict]+".")
	if p.o.Governs != "" && len(p.o.Loads) > 1 {
		p.say("", "Governing load case: "+p.o.Governs+".")
	}
	if len(p.o.Unjudged) > 0 {
		p.say("", "Not judged in any load case: "+strings.Join(p.o.Unjudged, "; ")+".")
	}
	if p.opt.Partial != "" {
		p.say("", p.opt.Partial)
	}
}

// compare puts the load cases side by side, one line each.
func (p *page) compare() {
	if len(p.o.Loads) < 2 {
		return
	}
	p.heading("Load cases (* governs)")
	inside := p.hasInside()
	heads := []string{" ", "load case", "verdict"}
	if inside {
		heads = append(heads, ".inside air "+p.unit(unit.Temperature))
	}
	heads = append(heads, ".hottest face "+p.unit(unit.Temperature), "at",
		".heat "+p.unit(unit.Power), ".margin "+p.unit(unit.TemperatureDifference), "decided by")
	g := newGrid(heads...)
	for i := range p.o.Loads {
		l := &p.o.Loads[i]
		g.add(p.compareRow(l, inside)...)
		g.paintLast(2, paint(l.Verdict))
	}
	p.grid(g)
}

func (p *page) compareRow(l *checks.LoadOutcome, inside bool) []string {
	row := []string{star(l.Governing), clean(l.Name), verdictWord(l.Verdict)}
	if inside {
		row = append(row, p.tempAt(l, "inside air"))
	}
	hot, at := p.hottest(l)
	heat := ""
	if l.Status == checks.Converged {
		heat = number(p.value(unit.Power, l.HeatW), decimalsOf(p.value(unit.Power, l.HeatW)))
	}
	row = append(row, hot, at, heat)
	j := l.Deciding()
	if j == nil {
		return append(row, "", "")
	}
	margin := p.value(unit.TemperatureDifference, j.MarginK)
	return append(row, number(margin, visible(1, margin)), clean(j.At+": "+j.Limit))
}

func (p *page) hasInside() bool {
	for _, l := range p.o.Loads {
		for _, t := range l.Temps {
			if t.At == "inside air" {
				return true
			}
		}
	}
	return false
}

func (p *page) tempAt(l *checks.LoadOutcome, at string) string {
	for _, t := range l.Temps {
		if t.At == at {
			return number(p.value(unit.Temperature, t.K), 1)
		}
	}
	return ""
}

func (p *page) hottest(l *checks.LoadOutcome) (text, at string) {
	best := math.Inf(-1)
	for _, t := range l.Temps {
		if t.Kind == "outer surface" && t.K > best {
			best, at = t.K, t.At
			text = number(p.value(unit.Temperature, t.K), 1)
		}
	}
	return text, at
}

func star(governs bool) string {
	if governs {
		return "*"
	}
	return " "
}

// load shows one load case in full.
func (p *page) load(l *checks.LoadOutcome) {
	title := "Load case: " + clean(l.Name)
	if l.Purpose != "" {
		title += " (for " + clean(l.Purpose) + ")"
	}
	if l.Governing && len(p.o.Loads) > 1 {
		title += "   * governs"
	}
	p.heading(title)
	for _, c := range l.Changed {
		p.say("  changed: ", c.Label+" "+c.Typed)
	}
	if l.Status != checks.Converged {
		p.sayVerdict("  ", checks.NoResult, " ("+string(l.Status)+"): "+l.Message)
		return
	}
	p.surface(l)
	p.temperatures(l)
	p.loss(l)
	p.heat(l)
	p.layers(l)
	p.films(l)
	p.checks(l)
	p.effects(l)
	p.second(l)
	p.solution(l)
	for _, n := range l.Notes {
		p.say("  note: ", n)
	}
}

// surface names what the faces radiate and take up the sun with.
func (p *page) surface(l *checks.LoadOutcome) {
	b := l.Case.Body
	if !b.Emissivity.Set {
		return
	}
	text := fmt.Sprintf("emissivity %.3g (%.3g to %.3g)", b.Emissivity.Typical, b.Emissivity.Low, b.Emissivity.High)
	if b.Finish != "" {
		text = clean(b.Finish) + ", " + text
	}
	if b.Absorb.Set && len(l.Case.Surroundings.Sun) > 0 {
		text += fmt.Sprintf("; solar absorptance %.3g (%.3g to %.3g)", b.Absorb.Typical, b.Absorb.Low, b.Absorb.High)
	}
	p.say("  surface: ", text)
}

// loss is the heat that leaves the body, with its uncertainty.
func (p *page) loss(l *checks.LoadOutcome) {
	if l.Status != checks.Converged {
		return
	}
	d := decimalsOf(p.value(unit.Power, l.HeatW))
	w := func(v float64) string { return number(p.value(unit.Power, v), d) }
	text := fmt.Sprintf("%s %s (- %s, + %s)", w(l.HeatW), p.unit(unit.Power), w(l.HeatMinusW), w(l.HeatPlusW))
	if l.HeatPerM != 0 {
		text += ", that is " + p.opt.Units.Show(unit.HeatPerLength, l.HeatPerM, decimalsOf(p.value(unit.HeatPerLength, l.HeatPerM)))
	}
	p.say("  heat shed: ", text)
}

// conductivity has the decimals its size asks for.
func conductivity(k float64) string {
	if k >= 1 {
		return number(k, 1)
	}
	return number(k, 4)
}

// decimalsOf is one decimal, or as many as show three digits of a small number.
func decimalsOf(v float64) int {
	v = math.Abs(v)
	if v == 0 || v >= 10 {
		return 1
	}
	return min(2-int(math.Floor(math.Log10(v))), 12)
}

// lengthDecimals shows tenths of a millimetre or thousandths of an inch.
func (p *page) lengthDecimals() int {
	if p.opt.Units == unit.US {
		return 3
	}
	return 1
}

// layers shows the conduction through walls and layers of a lagged body, or of
// any body when everything is wanted.
func (p *page) layers(l *checks.LoadOutcome) {
	lagged := slices.ContainsFunc(l.Layers, func(y checks.LayerRow) bool { return y.Place != "wall" })
	if !lagged && !(p.opt.Verbose && len(l.Layers) > 0) {
		return
	}
	p.heading("  Wall and layers")
	t := p.unit(unit.Temperature)
	g := newGrid("at", "layer", ".t "+p.unit(unit.Length), ".k "+p.unit(unit.Conductivity), ".inside "+t, ".outside "+t, "material", "range")
	for _, y := range l.Layers {
		inRange := "within"
		if !y.InRange {
			inRange = "OUTSIDE"
		}
		g.add(clean(y.At), y.Place, number(p.value(unit.Length, y.ThicknessM), p.lengthDecimals()), conductivity(p.value(unit.Conductivity, y.K)),
			number(p.value(unit.Temperature, y.InnerK), 1), number(p.value(unit.Temperature, y.OuterK), 1), clean(y.Material), inRange)
	}
	p.grid(g)
}

func (p *page) temperatures(l *checks.LoadOutcome) {
	if len(l.Temps) == 0 {
		return
	}
	us := make([]float64, 0, 2*len(l.Temps))
	for _, t := range l.Temps {
		us = append(us, p.value(unit.TemperatureDifference, t.MinusK), p.value(unit.TemperatureDifference, t.PlusK))
	}
	d := decimalsFor(us...)
	k := p.unit(unit.TemperatureDifference)
	several := len(p.o.Loads) > 1
	if several {
		p.heading("  Temperatures (* no load case is worse)")
	} else {
		p.heading("  Temperatures")
	}
	g := newGrid(" ", "at", "."+p.unit(unit.Temperature), ".- "+k, ".+ "+k, "of")
	for _, t := range l.Temps {
		g.add(star(t.Governing && several), clean(t.At), number(p.value(unit.Temperature, t.K), d),
			up(p.value(unit.TemperatureDifference, t.MinusK), d),
			up(p.value(unit.TemperatureDifference, t.PlusK), d), t.Kind)
	}
	p.grid(g)
}

func (p *page) heat(l *checks.LoadOutcome) {
	if len(l.Heat) == 0 {
		return
	}
	p.heading("  Heat paths (share of the heat exchanged with air and surroundings)")
	g := newGrid("by", "."+p.unit(unit.Power), ".share %", "path")
	most := 0.0
	for _, h := range l.Heat {
		most = math.Max(most, math.Abs(p.value(unit.Power, h.W)))
	}
	for _, h := range l.Heat {
		share := ""
		if h.Final {
			share = number(100*h.Share, 1)
		}
		g.add(h.By, number(p.value(unit.Power, h.W), decimalsOf(most)), share, clean(h.From+" → "+h.To))
	}
	p.grid(g)
}

func (p *page) films(l *checks.LoadOutcome) {
	if len(l.Films) == 0 {
		return
	}
	p.heading("  Air films (stillair methods ID tells more about a method)")
	g := newGrid("at", "side", "method", ".L "+p.unit(unit.Length), "Ra", ".Nu",
		".h "+p.unit(unit.Coefficient), "range")
	for _, f := range l.Films {
		inRange := "within"
		if !f.InRange {
			inRange = "OUTSIDE"
		}
		g.add(clean(f.At), f.Side, f.MethodID, number(p.value(unit.Length, f.LengthM), p.lengthDecimals()),
			power(f.Ra), number(f.Nu, 2), number(p.value(unit.Coefficient, f.H), 2), inRange)
	}
	p.grid(g)
	for _, f := range l.Films {
		if f.Range != "" {
			p.say("  outside range: ", f.At+", "+f.Side+": "+f.Range)
		}
		for _, n := range f.Notes {
			p.say("  film: ", f.At+", "+f.Side+": "+n)
		}
	}
}

func (p *page) checks(l *checks.LoadOutcome) {
	if len(l.Verdicts) == 0 {
		p.heading("  Checks")
		p.line("  %s", l.Verdict)
		return
	}
	d := p.checkDecimals(l)
	t, k := p.unit(unit.Temperature), p.unit(unit.TemperatureDifference)
	p.heading("  Checks (* governs)")
	g := newGrid(" ", "at", ".limit "+t, ".value "+t, ".± "+k, ".margin "+k, "verdict", "limit [source]")
	var sources []string
	for _, j := range l.Verdicts {
		n := indexOrAdd(&sources, source(j))
		g.add(star(j.Governing), clean(j.At), number(p.value(unit.Temperature, j.LimitK), d),
			number(p.value(unit.Temperature, j.ValueK), d),
			up(p.value(unit.TemperatureDifference, j.Uncertainty), min(d, 1)),
			number(p.value(unit.TemperatureDifference, j.MarginK), d), verdictWord(j.Verdict), fmt.Sprintf("%s [%d]", clean(j.Limit), n+1))
		g.paintLast(6, paint(j.Verdict))
	}
	p.grid(g)
	for i, s := range sources {
		p.say(fmt.Sprintf("  [%d] ", i+1), s)
	}
	if p.opt.Verbose {
		p.steps(l)
	}
}

// checkDecimals is one decimal, or as many as it takes that no margin which is
// not zero reads as zero: the verdict must be visible in the numbers.
func (p *page) checkDecimals(l *checks.LoadOutcome) int {
	d := 1
	for _, j := range l.Verdicts {
		d = visible(d, p.value(unit.TemperatureDifference, j.MarginK))
	}
	return d
}

// visible raises the decimals d until v does not round to zero, to 4 at most.
func visible(d int, v float64) int {
	for v != 0 && d < 4 && math.Abs(v) < 0.5*math.Pow10(-d) {
		d++
	}
	return d
}

// source is where a limit comes from and how far that is known.
func source(j checks.Judged) string {
	parts := []string{}
	for _, s := range []string{j.Source, j.Why} {
		if s != "" && !slices.ContainsFunc(parts, func(said string) bool { return strings.Contains(said, s) }) {
			parts = append(parts, s)
		}
	}
	text := cmp.Or(strings.Join(parts, "; "), "no source given")
	if j.Confidence != "" {
		text += " (confidence in the number: " + j.Confidence + ")"
	}
	return text
}

func indexOrAdd(list *[]string, s string) int {
	if i := slices.Index(*list, s); i >= 0 {
		return i
	}
	*list = append(*list, s)
	return len(*list) - 1
}

// steps tells, once each, how a threshold was found, and how probable it is
// that a limit is met.
func (p *page) steps(l *checks.LoadOutcome) {
	var told []string
	for _, j := range l.Verdicts {
		for _, s := range j.Steps {
			if !slices.Contains(told, s) {
				told = append(told, s)
				p.say("  threshold: ", s)
			}
		}
	}
	for _, j := range l.Verdicts {
		p.say("  probability: ", fmt.Sprintf("%s, %s: met with %s %% (normal law, ± read as two standard deviations)",
			j.At, j.Limit, number(100*j.Conformance, 1)))
	}
}

// effects shows what moves the governing temperature most.
func (p *page) effects(l *checks.LoadOutcome) {
	rows := slices.Clone(l.Effects)
	at := l.Place()
	if !p.opt.Verbose {
		rows = slices.DeleteFunc(rows, func(e checks.Effect) bool { return e.At != at })
	}
	if len(rows) == 0 {
		return
	}
	slices.SortStableFunc(rows, func(a, b checks.Effect) int {
		return cmp.Or(cmp.Compare(a.At, b.At), cmp.Compare(size(b), size(a)))
	})
	if !p.opt.Verbose && len(rows) > 5 {
		rows = rows[:5]
	}
	k := p.unit(unit.TemperatureDifference)
	p.heading("  What matters most (one input shifted at a time)")
	g := newGrid("at", ".up "+k, ".down "+k, "shift", "input")
	for _, e := range rows {
		g.add(clean(e.At), number(p.value(unit.TemperatureDifference, e.UpK), 2),
			number(p.value(unit.TemperatureDifference, e.DownK), 2), clean(e.Shift), clean(e.Of))
	}
	p.grid(g)
}

func size(e checks.Effect) float64 { return math.Max(math.Abs(e.UpK), math.Abs(e.DownK)) }

// second compares with the other set of published correlations.
func (p *page) second(l *checks.LoadOutcome) {
	s := l.Second
	if s == nil {
		return
	}
	p.heading("  Second method")
	if s.Status != checks.Converged {
		p.say("  ", "no result: "+string(s.Status))
		return
	}
	p.say("  ", strings.Join(s.Methods, ", "))
	t, k := p.unit(unit.Temperature), p.unit(unit.TemperatureDifference)
	g := newGrid("at", ".first "+t, ".second "+t, ".difference "+k)
	for _, r := range s.Rows {
		if !p.opt.Verbose && r.At != l.Place() {
			continue
		}
		g.add(clean(r.At), number(p.value(unit.Temperature, r.FirstK), 1), number(p.value(unit.Temperature, r.K), 1),
			number(p.value(unit.TemperatureDifference, r.DiffK), 1))
	}
	if len(g.rows) > 1 {
		p.grid(g)
	}
	d := decimalsOf(p.value(unit.Power, l.HeatW))
	p.say("  ", fmt.Sprintf("heat shed: %s %s by the first, %s %s by the second", number(p.value(unit.Power, l.HeatW), d), p.unit(unit.Power),
		number(p.value(unit.Power, s.HeatW), d), p.unit(unit.Power)))
}

// times counts iterations in words.
func times(n int) string {
	if n == 1 {
		return "1 iteration"
	}
	return fmt.Sprintf("%d iterations", n)
}

// solution says how the balance was solved and how well it closes.
func (p *page) solution(l *checks.LoadOutcome) {
	p.heading("  Solution")
	p.say("  ", fmt.Sprintf("%s in %s; largest heat left over at any point %s W; air pressure %s",
		l.Status, times(l.Iterations), power(l.ClosureW), p.opt.Units.Show(unit.Pressure, l.PressurePa, 2)))
	if c := l.CrossCheck; c.Iterations > 0 {
		agree := "agrees"
		if !c.Agrees {
			agree = "DOES NOT AGREE"
		}
		p.say("  ", fmt.Sprintf("plain damped substitution %s: largest difference %s K after %s",
			agree, power(c.MaxDiffK), times(c.Iterations)))
	}
	if l.DewPointK > 0 {
		p.say("  ", "dew point "+p.opt.Units.Show(unit.Temperature, l.DewPointK, 1))
	}
}

func (p *page) assumptions() {
	if len(p.o.Assumptions) > 0 {
		p.heading("Taken for granted")
		for _, a := range p.o.Assumptions {
			p.say("  - ", a)
		}
	}
	if len(p.o.Assumed) == 0 {
		return
	}
	p.heading("Assumed, because the case does not say")
	for _, a := range p.o.Assumed {
		text := a.Label + ": " + cmp.Or(a.Typed, a.SI)
		if a.Source != "" {
			text += " (" + a.Source + ")"
		}
		p.say("  - ", text)
	}
}

func (p *page) warnings() {
	if p.o.File == nil || len(p.o.File.Warnings) == 0 {
		return
	}
	p.heading("Warnings about the case file")
	for _, w := range p.o.File.Warnings {
		p.say("  - ", fmt.Sprintf("%s: line %d: %s", w.Code, w.Line, w.Message))
	}
}

// cautions prints the first few; the note carries all of them.
func (p *page) cautions() {
	if len(p.o.Cautions) == 0 {
		return
	}
	p.heading("Cautions: a surface that can be touched was judged")
	shown := p.o.Cautions
	if !p.opt.Verbose && len(shown) > 3 {
		shown = shown[:3]
	}
	for _, c := range shown {
		p.say("  - ", c)
	}
	if n := len(p.o.Cautions) - len(shown); n > 0 {
		p.say("  - ", fmt.Sprintf("%d more: see the calculation note, or --verbose.", n))
	}
}

func (p *page) foot() {
	p.line("")
	p.say("", fmt.Sprintf("%s %s, data %s; case file SHA-256 %s", p.o.Program.Name, p.o.Program.Version,
		p.o.Program.Data, p.o.Case.SHA256))
	p.say("", "± is about two standard deviations. Calculated averages of each face; verify by measurement before relying on them.")
}
