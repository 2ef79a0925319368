package checks

import (
	"fmt"
	"math"

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
		Temps: []Temp{}, Heat: []HeatPath{}, Films: []FilmRow{}, Layers: []LayerRow{}, Verdicts: []Judged{},
	}
	if s.Status != balance.Converged {
		l.Message = fmt.Sprintf("load case %q: %s", c.Load.Name, s.Message)
		return l
	}
	l.Temps, l.Heat, l.Films, l.Layers, l.HeatW = m.temps(s), m.heatPaths(s), m.films(s), m.layers(s), m.heatShed(s)
	l.CrossCheck = crossCheck(m, s)
	l.Notes = append(l.Notes, m.remarks(l)...)
	if out := propertiesLeft(l.Films); out != "" {
		l.Status, l.Message = OutOfProperties, fmt.Sprintf("load case %q: %s", c.Load.Name, out)
		return l
	}
	var notes []string
	l.Effects, notes = uncertain(m, l.Temps, l.Films)
	l.Notes = append(l.Notes, notes...)
	if c.Surroundings.Humidity.Set {
		l.DewPointK = limit.DewPoint(c.Surroundings.Air.SI, c.Surroundings.Humidity.SI)
	}
	l.Verdicts = append(l.Verdicts, judge(c, l.Temps, l.Effects, l.DewPointK)...)
	l.Second = secondMethod(m, l)
	return l
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

// crossCheck solves the same balance by plain damped substitution.
func crossCheck(m *model, s balance.Solution) CrossCheck {
	d := m.b.SolveDamped()
	x := CrossCheck{Iterations: len(d.Steps)}
	for i := range s.T {
		x.MaxDiffK = math.Max(x.MaxDiffK, math.Abs(s.T[i]-d.T[i]))
	}
	x.Agrees = d.Status == balance.Converged && x.MaxDiffK <= 1e-6
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
			list = append(list, fmt.Sprintf("%s, %s: between %.0f K and %.0f K its conductivity table ends; the nearest published value is used", y.At, y.Material, y.InnerK, y.OuterK))
		}
	}
	if !l.CrossCheck.Agrees {
		list = append(list, fmt.Sprintf("plain damped substitution differs by %.2g K after %d iterations", l.CrossCheck.MaxDiffK, l.CrossCheck.Iterations))
	}
	if m.c.Body.Kind == "pipe" {
		list = append(list, fmt.Sprintf("heat loss per metre of pipe: %.4g W/m", l.HeatW/m.c.Body.Length.SI))
	}
	return list
}

// secondMethod solves the same balance with another published correlation for
// every kind of face.
func secondMethod(m *model, l LoadOutcome) *SecondMethod {
	n := compile(m.c, otherChoice(l.Films), tuning{})
	s := n.b.Solve()
	second := &SecondMethod{Status: Status(s.Status)}
	if s.Status != balance.Converged {
		return second
	}
	seen := map[string]bool{}
	for _, f := range n.films(s) {
		if !seen[f.Method] {
			seen[f.Method] = true
			second.Methods = append(second.Methods, f.Method)
		}
	}
	for i, t := range n.temps(s) {
		second.Rows = append(second.Rows, SecondRow{At: t.At, FirstK: l.Temps[i].K, K: t.K, DiffK: t.K - l.Temps[i].K})
	}
	return second
}

// otherChoice picks, for every situation met, the published alternative, or the
// default where the first calculation already used the alternative.
func otherChoice(films []FilmRow) freeconv.Choice {
	choice := freeconv.Choice{}
	for _, f := range films {
		for _, kind := range f.Film.Method.Kinds {
			other := freeconv.Alternative(kind)
			if other == nil || other.ID == f.MethodID {
				other, _ = freeconv.Default(kind)
			}
			choice[kind] = other.ID
		}
	}
	return choice
}
