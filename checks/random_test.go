package checks

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"stillair/checks/balance"
	"stillair/checks/casefile"
	"stillair/freeconv"
)

func q(v float64) casefile.Quantity { return casefile.Quantity{SI: v, Set: true} }

// randomCase draws a body of any kind over wild ranges: 1e-6 to 1e6 W heated
// or cooled, emissivity 0 to 1, radiant temperature 100 K below to 300 K above
// the air, 5 mm to 5 m.
func randomCase(t *rapid.T) casefile.Case {
	size := func(name string) casefile.Quantity {
		return q(math.Pow(10, rapid.Float64Range(-2.3, 0.7).Draw(t, name)))
	}
	air := rapid.Float64Range(230, 330).Draw(t, "air")
	c := casefile.Case{
		Load:         casefile.Load{Name: "random"},
		Surroundings: casefile.Surroundings{Air: q(air), Radiant: q(air + rapid.Float64Range(-100, 300).Draw(t, "radiant")), Altitude: q(rapid.Float64Range(0, 4000).Draw(t, "z"))},
		Inside:       casefile.Inside{Emissivity: q(rapid.Float64Range(0, 1).Draw(t, "inner emissivity")), UpperZone: q(1.3)},
	}
	e := rapid.OneOf(rapid.Just(0.0), rapid.Float64Range(0, 1)).Draw(t, "emissivity")
	c.Body = casefile.Body{
		Kind:  rapid.SampledFrom([]string{"plate", "cylinder", "pipe", "sphere", "box", "vessel"}).Draw(t, "kind"),
		Width: size("width"), Height: size("height"), Depth: size("depth"), Diameter: size("diameter"), Length: size("length"),
		Tilt:       q(rapid.Float64Range(-math.Pi/2, math.Pi/2).Draw(t, "tilt")),
		Axis:       rapid.SampledFrom([]string{"horizontal", "vertical"}).Draw(t, "axis"),
		Heads:      rapid.SampledFrom([]string{"flat", "dished"}).Draw(t, "heads"),
		Emissivity: casefile.Range{Low: e, Typical: e, High: e, Set: true},
	}
	for range rapid.IntRange(0, 2).Draw(t, "layers") {
		c.Body.Layers = append(c.Body.Layers, casefile.Layer{
			Thickness:    q(math.Pow(10, rapid.Float64Range(-4, -1).Draw(t, "thickness"))),
			Conductivity: q(math.Pow(10, rapid.Float64Range(-2, 2.5).Draw(t, "k"))),
		})
	}
	if rapid.Bool().Draw(t, "by contents") {
		c.Contents = q(rapid.Float64Range(200, 900).Draw(t, "contents"))
		return c
	}
	w := math.Pow(10, rapid.Float64Range(-6, 6).Draw(t, "log W"))
	if rapid.IntRange(0, 2).Draw(t, "cooled") == 0 {
		w = -w
	}
	c.Heat = q(w)
	return c
}

// Random bodies close their heat balance to 1e-9 of its scale or say by name
// why not; plain damped substitution finds the same temperatures; no number is
// NaN.
func TestRandomBodiesCloseTheirBalance(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := compile(randomCase(t), freeconv.Choice{}, tuning{})
		s := m.b.Solve()
		switch s.Status {
		case balance.Impossible:
			if m.c.Heat.SI >= 0 {
				t.Fatalf("heated, yet impossible: %s", s.Message)
			}
			return
		case balance.NotConverged:
			t.Fatalf("%s", s.Message)
		}
		if !(s.Closure <= 1e-9*s.Scale) {
			t.Fatalf("closure %.3g W of %.3g W", s.Closure, s.Scale)
		}
		for _, x := range m.temps(s) {
			if math.IsNaN(x.K) || x.K < 0 {
				t.Fatalf("%s at %g K", x.At, x.K)
			}
		}
		in := m.heatShed(s)
		if m.c.Heat.Set && math.Abs(in-m.c.Heat.SI) > 2e-8*s.Scale {
			t.Fatalf("%.9g W put in, %.9g W shed", m.c.Heat.SI, in)
		}
		d := m.b.SolveDamped()
		for i := range s.T {
			if diff := math.Abs(s.T[i] - d.T[i]); diff > 1e-6 && diff > 1e-8*s.T[i] {
				t.Fatalf("%s: %.9f K, damped substitution %s %.9f K", m.b.Name(balance.Node(i)), s.T[i], d.Status, d.T[i])
			}
		}
	})
}

// A heated body is never hotter with a higher emissivity when surroundings and
// air are equally warm, and never cooler with more heat.
func TestEmissivityAndHeatWorkTheRightWay(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := randomCase(t)
		c.Contents = casefile.Quantity{}
		c.Heat = q(math.Abs(c.Heat.SI) + 1e-6)
		c.Surroundings.Radiant = c.Surroundings.Air
		solve := func(c casefile.Case) float64 {
			m := compile(c, freeconv.Choice{}, tuning{})
			s := m.b.Solve()
			if s.Status != balance.Converged {
				t.Fatal(s.Message)
			}
			return s.T[m.core]
		}
		base := solve(c)
		bright, strong := c, c
		bright.Body.Emissivity.Typical = c.Body.Emissivity.Typical / 2
		strong.Heat.SI *= 1.5
		if v := solve(bright); v < base*(1-1e-9) {
			t.Fatalf("half the emissivity cools from %.9f K to %.9f K", base, v)
		}
		if v := solve(strong); v < base*(1-1e-9) {
			t.Fatalf("more heat cools from %.9f K to %.9f K", base, v)
		}
	})
}

// Through the whole check, random bodies end converged, impossible or out of
// the property range, never with two solvers that differ; what is converged has
// finite numbers only.
func TestRandomBodiesThroughTheWholeCheck(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := randomCase(t)
		c.Uncertainty = casefile.Uncertainty{Heat: q(0.1), Air: q(2), Contents: q(2), Correlation: q(0.2), Inside: q(0.2), UpperZone: q(0.2), Conductivity: q(0.16), Thickness: q(0.05)}
		l := runLoad(c)
		switch l.Status {
		case NotConverged: // a cooled body that a shift makes impossible
			if c.Heat.SI >= 0 || !strings.Contains(l.Message, "absolute zero") {
				t.Fatal(l.Message)
			}
		case Impossible, OutOfProperties:
			if len(l.Temps) > 0 || l.Verdict != NoResult {
				t.Fatalf("%s, yet %d temperatures and verdict %q", l.Status, len(l.Temps), l.Verdict)
			}
			return
		}
		for _, x := range l.Temps {
			if math.IsNaN(x.K+x.PlusK+x.MinusK) || math.IsInf(x.K+x.PlusK+x.MinusK, 0) {
				t.Fatalf("%s: %g K + %g - %g", x.At, x.K, x.PlusK, x.MinusK)
			}
		}
	})
}
