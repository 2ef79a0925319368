package checks

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks/balance"
	"stillair/checks/casefile"
	"stillair/checks/limit"
	"stillair/freeconv"
)

// SchemaName is the name and version of the JSON contract.
const SchemaName = "stillair.check/1"

// Run checks every load case of a file that was read without errors.
func Run(f *casefile.File, p Program) *Outcome {
	first := f.Cases[0]
	o := &Outcome{
		Schema: SchemaName, Case: CaseID{Title: first.Title, Tag: first.Tag, SHA256: f.SHA256},
		Program: p, File: f, Assumptions: assumptions(f.Cases),
	}
	for _, in := range f.Inputs {
		if in.Assumption {
			o.Assumed = append(o.Assumed, in)
		}
	}
	for _, c := range f.Cases {
		o.Loads = append(o.Loads, runLoad(c))
	}
	govern(o)
	o.Unjudged = unjudged(o)
	for _, l := range o.Loads {
		for _, v := range l.Verdicts {
			if v.Touch && o.Cautions == nil {
				o.Cautions = limit.Cautions()
			}
		}
	}
	return o
}

// runLoad solves and judges one load case.
func runLoad(c casefile.Case) LoadOutcome {
	m := compile(c, choiceOf(c), tuning{})
	s := m.b.Solve()
	l := LoadOutcome{
		Name: c.Load.Name, Purpose: c.Load.Purpose, Case: c, Changed: c.Load.Changed, PressurePa: m.pressure,
		Status: Status(s.Status), Message: s.Message, Iterations: len(s.Steps), ClosureW: s.Closure, Record: record(s),
		Verdict: NoResult, Temps: []Temp{}, Heat: []HeatPath{}, Films: []FilmRow{}, Layers: []LayerRow{}, Verdicts: []Judged{},
	}
	if s.Status != balance.Converged {
		return l.without(Status(s.Status), s.Message)
	}
	films := m.films(s)
	if out := propertiesLeft(films); out != "" {
		return l.without(OutOfProperties, out)
	}
	l.Temps, l.Heat, l.Films, l.Layers, l.HeatW = m.temps(s), m.heatPaths(s), films, m.layers(s), m.heatShed(s)
	if l.CrossCheck = crossCheck(m, s); !l.CrossCheck.Agrees {
		return l.without(NotConverged, fmt.Sprintf("plain damped substitution differs by %.2g K after %d iterations", l.CrossCheck.MaxDiffK, l.CrossCheck.Iterations))
	}
	if err := uncertain(m, &l); err != nil {
		return l.without(NotConverged, err.Error())
	}
	l.Notes = append(l.Notes, m.remarks(l)...)
	if c.Body.Kind == "pipe" {
		l.HeatPerM = l.HeatW / c.Body.Length.SI
	}
	if c.Surroundings.Humidity.Set {
		l.DewPointK = limit.DewPoint(c.Surroundings.Air.SI, c.Surroundings.Humidity.SI)
	}
	l.Verdicts = append(l.Verdicts, judge(c, l.Temps, l.Effects, l.DewPointK)...)
	l.Verdict = l.worst()
	l.Notes = append(l.Notes, aboveTheMean(l)...)
	l.Second = secondMethod(m, l)
	if out := beyond(l.Second.Films); len(out) > 0 {
		l.Notes = append(l.Notes, fmt.Sprintf("second method: outside its published range on %s; its difference is no measure there", strings.Join(out, ", ")))
	}
	for _, v := range l.Second.Changed() {
		l.Notes = append(l.Notes, fmt.Sprintf("second method: %s, %s would be %q instead of %q", v.At, v.Limit, v.Second, v.First))
	}
	return l
}

// beyond names the films that are outside the range of their correlation.
func beyond(films []FilmRow) []string {
	var list []string
	for _, f := range films {
		if !f.InRange {
			list = append(list, f.At+" ("+f.Side+")")
		}
	}
	return list
}

// aboveTheMean tells when a limit of the inside air is met by the mean but not
// by the upper zone, unless the upper zone has a limit of its own.
func aboveTheMean(l LoadOutcome) []string {
	if slices.ContainsFunc(l.Verdicts, func(v Judged) bool { return v.At == "upper zone" && !v.Lower }) {
		return nil
	}
	var list []string
	for _, v := range l.Verdicts {
		for _, t := range l.Temps {
			if v.At == "inside air" && !v.Lower && v.MarginK >= 0 && t.Kind == "zone" && t.K > v.LimitK {
				list = append(list, fmt.Sprintf("inside air, %s: met by the mean, not by the upper zone; put a limit on the upper zone if parts near the roof need it", v.Limit))
			}
		}
	}
	return list
}

// without takes back what was found so far and gives the load case its status:
// a last guess is never handed out as an answer.
func (l LoadOutcome) without(status Status, why string) LoadOutcome {
	l.Status, l.Message = status, fmt.Sprintf("load case %q: %s", l.Name, why)
	l.Verdict, l.HeatW, l.Effects = NoResult, 0, nil
	l.Temps, l.Heat, l.Films, l.Layers = []Temp{}, []HeatPath{}, []FilmRow{}, []LayerRow{}
	return l
}

// worst is the gravest verdict of a load case.
func (l LoadOutcome) worst() Verdict {
	v := None
	if len(l.Case.Limits) > 0 {
		v = NotJudged
	}
	for _, row := range l.Verdicts {
		v = worse(v, row.Verdict)
	}
	return v
}

func choiceOf(c casefile.Case) freeconv.Choice {
	choice := freeconv.Choice{}
	for kind, id := range c.Methods {
		choice[freeconv.Kind(kind)] = id
	}
	return choice
}

func record(s balance.Solution) []Iteration {
	var rows []Iteration
	for _, st := range s.Steps {
		rows = append(rows, Iteration{N: st.N, ClosureW: st.Closure, ChangeK: st.Change})
	}
	return rows
}

// crossCheck solves the same balance by plain damped substitution. Both must
// agree, else there is no result to sign.
func crossCheck(m *model, s balance.Solution) CrossCheck {
	d := m.b.SolveDamped()
	x := CrossCheck{Iterations: len(d.Steps)}
	for i := range s.T {
		x.MaxDiffK = math.Max(x.MaxDiffK, math.Abs(s.T[i]-d.T[i]))
	}
	x.Agrees = x.MaxDiffK <= 1e-6
	return x
}

// propertiesLeft names the first film whose air is outside the range of the
// property equations.
func propertiesLeft(films []FilmRow) string {
	for _, f := range films {
		if !f.Film.PropsInRange {
			return fmt.Sprintf("the film %s on %s is at %.0f K, outside the range of the air property equations", f.Side, f.At, f.FilmK)
		}
	}
	return ""
}

// remarks are what a reader of one load case must know.
func (m *model) remarks(l LoadOutcome) []string {
	var list []string
	for _, f := range l.Films {
		if !f.InRange {
			list = append(list, fmt.Sprintf("film %s on %s: %s", f.Side, f.At, f.Range))
		}
	}
	for _, y := range l.Layers {
		if !y.InRange {
			list = append(list, outsideTable(y))
		}
	}
	if h := m.c.Surroundings.Humidity; h.Set && !limit.DewPointInRange(m.c.Surroundings.Air.SI, h.SI) {
		list = append(list, "the dew point lies outside the range of its formula; below 0 °C surfaces frost at a slightly higher temperature")
	} else if h.Set && limit.DewPoint(m.c.Surroundings.Air.SI, h.SI) < zeroCelsius {
		list = append(list, "the dew point is below 0 °C: surfaces frost at a slightly higher temperature, about a tenth of the distance to 0 °C")
	}
	return list
}

// outsideTable tells where the conductivity of a layer was published and where
// it was used.
func outsideTable(y LayerRow) string {
	p := y.Solid.Points
	if len(p) == 1 {
		return fmt.Sprintf("%s: the conductivity of %s is published at %.0f °C only and used from %.0f °C to %.0f °C",
			y.At, y.Material, p[0].T-zeroCelsius, y.OuterK-zeroCelsius, y.InnerK-zeroCelsius)
	}
	return fmt.Sprintf("%s: the conductivity of %s is published for %.0f °C to %.0f °C and used from %.0f °C to %.0f °C; beyond its hot end a rising table is carried on with its last slope",
		y.At, y.Material, p[0].T-zeroCelsius, p[len(p)-1].T-zeroCelsius, y.OuterK-zeroCelsius, y.InnerK-zeroCelsius)
}

// zeroCelsius is 0 °C in kelvin.
const zeroCelsius = 273.15

// secondMethod solves the same balance with another published correlation for
// every kind of face.
func secondMethod(m *model, l LoadOutcome) *SecondMethod {
	n := compile(m.c, otherChoice(m.choice), tuning{})
	s := n.b.Solve()
	second := &SecondMethod{Status: Status(s.Status), Methods: []string{}, Rows: []SecondRow{}, Films: []FilmRow{}, Verdicts: []SecondVerdict{}}
	if s.Status != balance.Converged {
		return second
	}
	seen := map[string]bool{}
	second.Films, second.HeatW = n.films(s), n.heatShed(s)
	for i, f := range second.Films {
		second.Films[i].Why = "second method: another publication for the same situation"
		if !seen[f.Method] {
			seen[f.Method] = true
			second.Methods = append(second.Methods, f.Method)
		}
	}
	temps := n.temps(s)
	for i, v := range judge(m.c, temps, l.Effects, l.DewPointK) {
		second.Verdicts = append(second.Verdicts, SecondVerdict{At: v.At, Limit: v.Limit, First: l.Verdicts[i].Verdict, Second: v.Verdict, ValueK: v.ValueK, LimitK: v.LimitK, U: v.Uncertainty})
	}
	for i, t := range temps {
		second.Rows = append(second.Rows, SecondRow{At: t.At, FirstK: l.Temps[i].K, K: t.K, DiffK: t.K - l.Temps[i].K})
	}
	return second
}

// otherChoice picks, for every situation, the published alternative, or the
// default where the first calculation was asked to use the alternative.
func otherChoice(first freeconv.Choice) freeconv.Choice {
	choice := freeconv.Choice{}
	for _, kind := range freeconv.Kinds() {
		other := freeconv.Alternative(kind)
		if first[kind] == other.ID {
			other, _ = freeconv.Default(kind)
		}
		choice[kind] = other.ID
	}
	return choice
}
