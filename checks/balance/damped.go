package balance

import "math"

// omega damps plain substitution. The error shrinks by |1 - omega m| a step,
// where m is the local exponent of the heat in the temperature difference: 1.25
// for laminar films, below 4 for radiation of very hot bodies. With 0.4 the
// factor stays below 0.75 for every heated body.
const omega = 0.4

// SolveDamped finds the temperatures by plain damped substitution: secant
// conductances at the present temperatures, one linear solve, part of the
// change. It knows no slopes, no bracket and no line search, starts elsewhere,
// and serves as the independent check of Solve.
func (b *Balance) SolveDamped() Solution {
	unknown := b.unknowns()
	s := b.newState()
	if m := b.tooCold(unknown); m != "" {
		return b.ending(Impossible, m, s, nil)
	}
	if m := b.noWayOut(); m != "" {
		return b.ending(Impossible, m, s, nil)
	}
	for _, n := range unknown {
		s.excess[n] = 1
	}
	b.evaluate(s)
	if len(unknown) == 0 {
		return b.ending(Converged, "", s, nil)
	}
	steps := b.damped(s, unknown, 4*maxSteps)
	last := Step{Change: math.Inf(1)}
	if len(steps) > 0 {
		last = steps[len(steps)-1]
	}
	return b.conclude(s, steps, b.settledBy(last.Change, s, unknown))
}

// settled ends damped substitution: change of a step over the largest excess,
// and never more than settledK kelvin; where the answer is that nothing differs
// from the air, over the reference temperature.
const (
	settled  = 1e-11
	settledK = 1e-8
	settled0 = 1e-15
)

func (b *Balance) settledBy(change float64, s *state, unknown []Node) bool {
	return change <= math.Max(math.Min(settled*b.largest(s, unknown), settledK), settled0*b.ref)
}

func (b *Balance) largest(s *state, unknown []Node) float64 {
	most := 0.0
	for _, n := range unknown {
		most = math.Max(most, math.Abs(s.excess[n]))
	}
	return most
}

// damped iterates in place until the temperatures settle.
func (b *Balance) damped(s *state, unknown []Node, most int) []Step {
	var steps []Step
	for n := 1; n <= most; n++ {
		dx, ok := b.step(s, b.secants(s), unknown)
		if !ok {
			return steps
		}
		_, rest := b.worst(s)
		change := 0.0
		for i, u := range unknown {
			part := b.notTooFar(s.excess[u], omega*dx[i])
			change = math.Max(change, math.Abs(part))
			s.move(u, part)
		}
		b.evaluate(s)
		steps = append(steps, Step{N: n, Closure: rest, Change: change})
		if b.settledBy(change, s, unknown) {
			break
		}
	}
	return steps
}

// secants are the conductances heat over temperature difference; without a
// difference the slope over a tiny one stands in.
func (b *Balance) secants(s *state) [][2]float64 {
	g := make([][2]float64, len(b.Links))
	for i, l := range b.Links {
		dt := (s.excess[l.From] - s.excess[l.To]) + (s.low[l.From] - s.low[l.To])
		c := s.heat[i] / dt
		if tiny := 1e-12 * b.ref; math.Abs(dt) < tiny {
			c = math.Abs(b.through(l, s, tiny, 0)) / tiny
		}
		g[i] = [2]float64{c, -c}
	}
	return g
}
