package checks

import (
	"fmt"
	"math"
	"slices"

	"stillair/checks/balance"
	"stillair/checks/casefile"
	"stillair/freeconv"
)

// shift is one input moved up and down by about two standard deviations.
type shift struct {
	of, size, source string
	up, down         func(c *casefile.Case, t *tuning)
}

const (
	ofAir      = "air and radiant temperature"
	notSourced = "no published scatter: value set in the case or its default"
)

// shifts lists every input that carries an uncertainty in this case.
func shifts(m *model, films []FilmRow) []shift {
	list := inputShifts(m.c)
	list = append(list, surfaceShifts(m.c)...)
	list = append(list, layerShifts(m)...)
	return append(list, filmShifts(m.c, films)...)
}

func inputShifts(c casefile.Case) []shift {
	u := c.Uncertainty
	var list []shift
	if c.Heat.Set && c.Heat.SI != 0 {
		list = append(list, relative("heat", u.Heat, func(c *casefile.Case, f float64) { c.Heat.SI *= f }))
	}
	if c.Contents.Set {
		list = append(list, absolute("contents temperature", u.Contents, func(c *casefile.Case, d float64) { c.Contents.SI += d }))
	}
	list = append(list, absolute(ofAir, u.Air, warmSurroundings))
	if len(c.Surroundings.Sun) > 0 {
		list = append(list, relative("sun", u.Sun, func(c *casefile.Case, f float64) {
			c.Surroundings.Sun = scaled(c.Surroundings.Sun, f)
		}))
	}
	if c.Body.Kind == "box" {
		list = append(list, absolute("effective emissivity inside", u.Inside, func(c *casefile.Case, d float64) {
			c.Inside.Emissivity.SI = clip(c.Inside.Emissivity.SI+d, 0, 1)
		}), absolute("upper zone factor", u.UpperZone, func(c *casefile.Case, d float64) {
			c.Inside.UpperZone.SI = math.Max(c.Inside.UpperZone.SI+d, 1)
		}))
	}
	return list
}

// warmSurroundings moves air, radiant and seen temperatures together.
func warmSurroundings(c *casefile.Case, d float64) {
	s := &c.Surroundings
	s.Air.SI += d
	s.Radiant.SI += d
	seen := map[string]casefile.Quantity{}
	for k, q := range s.Sees {
		q.SI += d
		seen[k] = q
	}
	s.Sees = seen
}

func surfaceShifts(c casefile.Case) []shift {
	list := []shift{ends("emissivity outside", c.Body.Emissivity, func(c *casefile.Case, v float64) { c.Body.Emissivity.Typical = v })}
	if len(c.Surroundings.Sun) > 0 {
		list = append(list, ends("solar absorptance", c.Body.Absorb, func(c *casefile.Case, v float64) { c.Body.Absorb.Typical = v }))
	}
	return list
}

func layerShifts(m *model) []shift {
	var list []shift
	_, solids := m.stack()
	for _, s := range solids {
		i, k, t := s.index, m.c.Uncertainty.Conductivity, m.c.Uncertainty.Thickness
		list = append(list,
			tuned("conductivity of "+s.name, k, func(t *tuning, f float64) { t.conductivity = map[int]float64{i: f} }),
			tuned("thickness of "+s.name, t, func(t *tuning, f float64) { t.thickness = map[int]float64{i: f} }))
	}
	return list
}

// filmShifts moves all films of one correlation and side together.
func filmShifts(c casefile.Case, films []FilmRow) []shift {
	type group struct{ side, id string }
	var order []group
	keys := map[group][]filmKey{}
	first := map[group]FilmRow{}
	for _, r := range films {
		g := group{r.Side, method(r).ID}
		if _, seen := first[g]; !seen {
			first[g] = r
			order = append(order, g)
		}
		keys[g] = append(keys[g], filmKey{r.At, r.Side})
	}
	var list []shift
	for _, g := range order {
		row := first[g]
		size, source := c.Uncertainty.Correlation, notSourced
		if s := method(row).Scatter; s > 0 {
			size = casefile.Quantity{SI: s, Typed: fmt.Sprintf("%.3g %%", 100*s)}
			source = method(row).ScatterNote
		}
		s := tuned("film "+g.side+", "+method(row).Name, size, func(t *tuning, f float64) {
			t.film = map[filmKey]float64{}
			for _, k := range keys[g] {
				t.film[k] = f
			}
		})
		s.source = source
		list = append(list, s)
	}
	return list
}

// method is the record behind a film: the rule where one chose between two laws,
// since its scatter shifts the film whichever law governs.
func method(r FilmRow) *freeconv.Correlation {
	if r.Film.Rule != nil {
		return r.Film.Rule
	}
	return r.Film.Method
}

// relative shifts by a fraction, absolute by an amount, tuned by a fraction of
// what the tuning multiplies, ends to both ends of a range.
func relative(of string, u casefile.Quantity, set func(*casefile.Case, float64)) shift {
	return shift{of, "± " + u.Typed, sourceOf(u),
		func(c *casefile.Case, _ *tuning) { set(c, 1+u.SI) },
		func(c *casefile.Case, _ *tuning) { set(c, 1-u.SI) }}
}

func absolute(of string, u casefile.Quantity, set func(*casefile.Case, float64)) shift {
	return shift{of, "± " + u.Typed, sourceOf(u),
		func(c *casefile.Case, _ *tuning) { set(c, u.SI) },
		func(c *casefile.Case, _ *tuning) { set(c, -u.SI) }}
}

func tuned(of string, u casefile.Quantity, set func(*tuning, float64)) shift {
	return shift{of, "± " + u.Typed, sourceOf(u),
		func(_ *casefile.Case, t *tuning) { set(t, 1+u.SI) },
		func(_ *casefile.Case, t *tuning) { set(t, 1-u.SI) }}
}

func ends(of string, r casefile.Range, set func(*casefile.Case, float64)) shift {
	return shift{of, fmt.Sprintf("%.2f to %.2f", r.Low, r.High), r.Source,
		func(c *casefile.Case, _ *tuning) { set(c, r.High) },
		func(c *casefile.Case, _ *tuning) { set(c, r.Low) }}
}

func sourceOf(u casefile.Quantity) string {
	if u.Source == "" {
		return "case file"
	}
	return u.Source
}

func scaled(m map[string]casefile.Quantity, f float64) map[string]casefile.Quantity {
	out := map[string]casefile.Quantity{}
	for k, q := range m {
		q.SI *= f
		out[k] = q
	}
	return out
}

func clip(v, low, high float64) float64 { return math.Min(math.Max(v, low), high) }

// uncertain shifts one input after the other, solves anew, and fills the
// uncertainty of every temperature and of the heat with the root of the sum of
// squares, the shifts that raise it apart from those that lower it (law of
// propagation of JCGM 100:2008, 5.1.2, uncorrelated, shifts of about two
// standard deviations). It fails when a shifted balance has no solution, since
// an uncertainty that leaves an input out would be too small.
func uncertain(m *model, l *LoadOutcome) error {
	plus, minus := 0.0, 0.0
	for _, s := range shifts(m, l.Films) {
		up, heatUp, err := shifted(m, s.of, s.up)
		if err != nil {
			return err
		}
		down, heatDown, err := shifted(m, s.of, s.down)
		if err != nil {
			return err
		}
		for i, t := range l.Temps {
			l.Effects = append(l.Effects, Effect{At: t.At, Of: s.of, Shift: s.size, UpK: up[i].K - t.K, DownK: down[i].K - t.K, Source: s.source})
		}
		plus = math.Hypot(plus, math.Max(0, math.Max(heatUp, heatDown)-l.HeatW))
		minus = math.Hypot(minus, math.Min(0, math.Min(heatUp, heatDown)-l.HeatW))
	}
	l.HeatPlusW, l.HeatMinusW = plus, minus
	for i := range l.Temps {
		l.Temps[i].PlusK, l.Temps[i].MinusK = combine(l.Effects, l.Temps[i].At)
	}
	return nil
}

func shifted(m *model, of string, apply func(*casefile.Case, *tuning)) ([]Temp, float64, error) {
	c, t := m.c, tuning{}
	apply(&c, &t)
	n := compile(c, m.choice, t)
	s := n.b.Solve()
	if s.Status != balance.Converged {
		return nil, 0, fmt.Errorf("the uncertainty could not be computed: with %s shifted, %s", of, s.Message)
	}
	return n.temps(s), n.heatShed(s), nil
}

// combine is the root of the sum of squares of the effects on one temperature.
func combine(effects []Effect, at string) (plus, minus float64) {
	for _, e := range effects {
		if e.At == at {
			plus = math.Hypot(plus, math.Max(0, math.Max(e.UpK, e.DownK)))
			minus = math.Hypot(minus, math.Min(0, math.Min(e.UpK, e.DownK)))
		}
	}
	return plus, minus
}

// Ranked lists the effects on one temperature, the largest first.
func (l LoadOutcome) Ranked(at string) []Effect {
	var list []Effect
	for _, e := range l.Effects {
		if e.At == at {
			list = append(list, e)
		}
	}
	size := func(e Effect) float64 { return math.Max(math.Abs(e.UpK), math.Abs(e.DownK)) }
	slices.SortStableFunc(list, func(a, b Effect) int {
		switch {
		case size(a) > size(b):
			return -1
		case size(a) < size(b):
			return 1
		}
		return 0
	})
	return list
}
