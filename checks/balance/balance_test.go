package balance

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"
)

const sigma = 5.670374419e-8 // W/(m²·K⁴), CODATA 2018

func radiation(ea float64) Law {
	return func(dt, t1, t2 float64) float64 { return ea * sigma * dt * (t1 + t2) * (t1*t1 + t2*t2) }
}

func conduction(g float64) Law { return func(dt, _, _ float64) float64 { return g * dt } }

// power is free convection with a constant coefficient: q = c dT |dT|^n.
func power(c, n float64) Law {
	return func(dt, _, _ float64) float64 { return c * dt * math.Pow(math.Abs(dt), n) }
}

func one(ref, w float64, laws ...Law) *Balance {
	b := New(ref)
	air, s := b.Fixed("air", ref), b.Unknown("plate")
	b.Source(s, w)
	for _, l := range laws {
		b.Connect(s, air, "x", l)
	}
	return b
}

// Each law alone has a solution in closed form.
func TestOneNodeAgainstClosedForms(t *testing.T) {
	for _, w := range []float64{1e-6, 1e-3, 1, 250, 1e4, 1e6} {
		for _, c := range []struct {
			name string
			law  Law
			want float64 // excess, K
		}{
			{"conduction", conduction(5), w / 5},
			{"convection", power(1.42, 0.25), math.Pow(w/1.42, 0.8)},
			{"radiation", radiation(0.9), math.Pow(w/(0.9*sigma)+math.Pow(300, 4), 0.25) - 300},
		} {
			s := one(300, w, c.law).Solve()
			tol := 1e-9 * c.want
			if c.name == "radiation" {
				tol += 1e-12 * 300 // the closed form itself loses digits for small heat
			}
			if s.Status != Converged || math.Abs(s.Excess[1]-c.want) > tol {
				t.Errorf("%s, %g W: %s, excess %.12g K, closed form %.12g K", c.name, w, s.Status, s.Excess[1], c.want)
			}
		}
	}
}

// Textbook network: two plane layers in series between 20 °C and a 100 W
// source, resistances add (Fourier; Incropera et al., 6th ed. 2007, eq. 3.19).
func TestSeriesResistancesAdd(t *testing.T) {
	b := New(293.15)
	air, outer, inner := b.Fixed("air", 293.15), b.Unknown("outer"), b.Unknown("inner")
	b.Source(inner, 100)
	b.Connect(inner, outer, "conduction", conduction(2))
	b.Connect(outer, air, "convection", conduction(8))
	s := b.Solve()
	if s.Status != Converged || math.Abs(s.T[inner]-(293.15+100*(1/2.0+1/8.0))) > 1e-9 {
		t.Errorf("%s, inner at %.9f K", s.Status, s.T[inner])
	}
}

func TestImpossibleIsSaid(t *testing.T) {
	cold := one(300, -1000, radiation(1)).Solve() // black body in 300 K receives 459 W at most
	if cold.Status != Impossible {
		t.Errorf("drawing 1000 W from a 459 W supply: %s at %.3g K", cold.Status, cold.T[1])
	}
	if s := one(300, -450, radiation(1)).Solve(); s.Status != Converged || s.T[1] > 120 {
		t.Errorf("drawing 450 W of 459 W: %s at %.3g K", s.Status, s.T[1])
	}
	b := New(300)
	b.Fixed("air", 300)
	b.Source(b.Unknown("core"), 10)
	if s := b.Solve(); s.Status != Impossible || s.Message == "" {
		t.Errorf("a node without a way out: %s %q", s.Status, s.Message)
	}
}

// randomNetwork is a box-like star: a core, walls with films and radiation,
// radiant surroundings apart from the air.
func randomNetwork(t *rapid.T) *Balance {
	ref := rapid.Float64Range(230, 330).Draw(t, "air")
	b := New(ref)
	air := b.Fixed("air", ref)
	sky := b.Fixed("sky", ref+rapid.Float64Range(-60, 60).Draw(t, "sky"))
	core := b.Unknown("core")
	b.Source(core, math.Pow(10, rapid.Float64Range(-6, 4).Draw(t, "log W")))
	for i := range rapid.IntRange(1, 6).Draw(t, "walls") {
		in, out := b.Unknown(fmt.Sprint("in", i)), b.Unknown(fmt.Sprint("out", i))
		b.Source(out, rapid.Float64Range(0, 800).Draw(t, "sun"))
		b.Connect(core, in, "convection", power(rapid.Float64Range(0.1, 3).Draw(t, "ci"), 0.25))
		b.Connect(core, in, "radiation", radiation(rapid.Float64Range(0, 1).Draw(t, "ei")))
		b.Connect(in, out, "conduction", conduction(math.Pow(10, rapid.Float64Range(0, 5).Draw(t, "k"))))
		b.Connect(out, air, "convection", power(rapid.Float64Range(0.1, 3).Draw(t, "co"), 1.0/3))
		b.Connect(out, sky, "radiation", radiation(rapid.Float64Range(0, 1).Draw(t, "eo")))
	}
	return b
}

// On random networks the balance closes to 1e-9 of its scale, and plain damped
// substitution finds the same temperatures.
func TestRandomNetworksCloseAndAgree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		b := randomNetwork(t)
		s := b.Solve()
		if s.Status != Converged || s.Closure > 1e-9*s.Scale {
			t.Fatalf("%s: %s, closure %.3g W of %.3g W", s.Status, s.Message, s.Closure, s.Scale)
		}
		d := b.SolveDamped()
		if d.Status != Converged {
			t.Fatalf("damped: %s %s", d.Status, d.Message)
		}
		for i := range s.T {
			if diff := math.Abs(s.T[i] - d.T[i]); diff > 1e-6 && diff > 1e-9*s.T[i] {
				t.Fatalf("%s: %.9f K and %.9f K", b.Name(Node(i)), s.T[i], d.T[i])
			}
		}
	})
}

// More heat is never cooler, anywhere.
func TestMoreHeatIsNeverCooler(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		b := randomNetwork(t)
		first := b.Solve()
		b.Source(Node(2), 1+math.Abs(b.SourceOf(2)))
		second := b.Solve()
		for i := range first.T {
			if second.T[i] < first.T[i]-1e-9*first.T[i] {
				t.Fatalf("%s fell from %.9f K to %.9f K", b.Name(Node(i)), first.T[i], second.T[i])
			}
		}
	})
}

func BenchmarkSolveSixWalls(b *testing.B) {
	n := New(300)
	air := n.Fixed("air", 300)
	core := n.Unknown("core")
	n.Source(core, 250)
	for range 6 {
		w := n.Unknown("wall")
		n.Connect(core, w, "convection", power(1, 0.25))
		n.Connect(w, air, "convection", power(1.3, 0.25))
		n.Connect(w, air, "radiation", radiation(0.9))
	}
	for b.Loop() {
		n.Solve()
	}
}

// Thermocouple bead in 20 °C air (h = 75 W/(m²·K)) between walls at 100 °C, all
// black: 28.4 °C. Lienhard & Lienhard, A Heat Transfer Textbook, 3rd ed.,
// Example 1.5 (open re-typed copy of the book's worked example).
func TestThermocoupleBeadPublished(t *testing.T) {
	b := New(293)
	air, walls, bead := b.Fixed("air", 293), b.Fixed("walls", 373), b.Unknown("bead")
	b.Connect(bead, air, "convection", conduction(75))
	b.Connect(bead, walls, "radiation", radiation(1))
	s := b.Solve()
	if s.Status != Converged || math.Abs(s.T[bead]-273-28.4) > 0.05 {
		t.Errorf("%s, bead at %.2f °C, published 28.4 °C", s.Status, s.T[bead]-273)
	}
}
