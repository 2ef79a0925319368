package balance

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"
)

// Status names how a solve ended.
type Status string

// The ways a solve ends.
const (
	Converged    Status = "converged"
	Impossible   Status = "impossible"
	NotConverged Status = "not converged"
)

// Step is one line of the iteration record.
type Step struct {
	N       int
	Closure float64 // W, most heat left over at any unknown node
	Change  float64 // K, largest change of temperature of the step
}

// Solution is what a solve hands back. Temperatures and heats are only to be
// used when Status is Converged.
type Solution struct {
	Status  Status
	Message string    // names the node; empty when converged
	T       []float64 // K, by node
	Excess  []float64 // K above the reference, by node
	Heat    []float64 // W, by link, positive From -> To
	Steps   []Step
	Closure float64 // W
	Scale   float64 // W, what Closure is judged against
}

const (
	tolerance  = 1e-11 // of the scale; reached or rounding has the last word
	acceptable = 1e-9  // of the scale: the promise made to the reader
	maxSteps   = 100
	coldest    = 1e-6 // of the reference temperature: as cold as a trial may get
)

// Solve finds the temperatures. It is a fixed point on the excess
// temperatures, x <- x + J⁻¹ r, with the slopes of all laws at the present
// temperatures (Newton's acceleration of successive substitution), cut back
// whenever a step does not bring the heat balance nearer. A single unknown is
// kept within a bracket that every evaluation tightens, so it cannot be
// missed. If the acceleration stalls, plain damped substitution takes over.
func (b *Balance) Solve() Solution {
	unknown := b.unknowns()
	s := b.newState()
	if m := b.tooCold(unknown); m != "" {
		return b.ending(Impossible, m, s, nil)
	}
	if len(unknown) == 0 {
		b.evaluate(s)
		return b.ending(Converged, "", s, nil)
	}
	if m := b.noWayOut(); m != "" {
		return b.ending(Impossible, m, s, nil)
	}
	b.start(s, unknown)
	steps, ok := b.accelerated(s, unknown)
	if !ok {
		more := b.damped(s, unknown, 2*maxSteps)
		last := len(steps)
		for _, m := range more {
			m.N += last
			steps = append(steps, m)
		}
		polish, done := b.accelerated(s, unknown)
		last = len(steps)
		for _, m := range polish {
			m.N += last
			steps = append(steps, m)
		}
		ok = done
	}
	return b.conclude(s, steps, ok)
}

// conclude names the ending of an iteration.
func (b *Balance) conclude(s *state, steps []Step, ok bool) Solution {
	at, rest := b.worst(s)
	if ok || rest <= acceptable*b.scale(s) {
		return b.ending(Converged, "", s, steps)
	}
	for i, n := range b.nodes {
		if !n.fixed && b.ref+s.excess[i] <= 10*coldest*b.ref {
			return b.ending(Impossible, fmt.Sprintf("%s would have to be colder than absolute zero", n.name), s, steps)
		}
	}
	return b.ending(NotConverged, fmt.Sprintf("at %s %.3g W are left over after %d iterations", b.nodes[at].name, rest, len(steps)), s, steps)
}

func (b *Balance) ending(st Status, message string, s *state, steps []Step) Solution {
	_, closure := b.worst(s)
	sol := Solution{Status: st, Message: message, Excess: s.excess, Heat: s.heat, Steps: steps, Closure: closure, Scale: b.scale(s)}
	sol.T = make([]float64, len(s.excess))
	for i, x := range s.excess {
		sol.T[i] = b.ref + x
	}
	return sol
}

func (b *Balance) unknowns() []Node {
	var u []Node
	for i, n := range b.nodes {
		if !n.fixed {
			u = append(u, Node(i))
		}
	}
	return u
}

// tooCold tells when even at absolute zero the surroundings cannot supply the
// heat that is drawn off. It tests the first end of the bracket.
func (b *Balance) tooCold(unknown []Node) string {
	drawn := 0.0
	for _, n := range unknown {
		drawn += b.nodes[n].source
	}
	if drawn >= 0 {
		return ""
	}
	s := b.newState()
	for _, n := range unknown {
		s.excess[n] = -b.ref * (1 - coldest)
	}
	b.evaluate(s)
	left := 0.0
	for _, n := range unknown {
		left += s.rest[n]
	}
	if left >= 0 {
		return ""
	}
	return fmt.Sprintf("the %.4g W drawn off are more than the surroundings can supply at absolute zero", -drawn)
}

// noWayOut tells when heat is put into nodes that no chain of links joins to a
// fixed temperature.
func (b *Balance) noWayOut() string {
	reached := make([]bool, len(b.nodes))
	for i, n := range b.nodes {
		reached[i] = n.fixed
	}
	for range b.nodes {
		for _, l := range b.Links {
			if reached[l.From] || reached[l.To] {
				reached[l.From], reached[l.To] = true, true
			}
		}
	}
	for i, ok := range reached {
		if !ok {
			return fmt.Sprintf("no path for heat leads from %s to the surroundings", b.nodes[i].name)
		}
	}
	return ""
}

// start makes a first guess: every law as steep as over the first ten kelvin.
func (b *Balance) start(s *state, unknown []Node) {
	const probe = 10.0
	g := make([][2]float64, len(b.Links))
	for i, l := range b.Links {
		c := math.Abs(b.through(l, s, probe, 0)) / probe
		g[i] = [2]float64{c, -c}
	}
	b.evaluate(s)
	if dx, ok := b.step(s, g, unknown); ok {
		for i, n := range unknown {
			s.move(n, b.notTooFar(s.excess[n], dx[i]))
		}
	}
	b.evaluate(s)
}

// positions maps every node to its row, or -1 when it is fixed.
func (b *Balance) positions(unknown []Node) []int {
	at := make([]int, len(b.nodes))
	for i := range at {
		at[i] = -1
	}
	for i, n := range unknown {
		at[n] = i
	}
	return at
}

func solveDense(a *mat.Dense, r *mat.VecDense) ([]float64, bool) {
	var lu mat.LU
	lu.Factorize(a)
	var x mat.VecDense
	if err := lu.SolveVecTo(&x, false, r); err != nil {
		if _, ill := err.(mat.Condition); !ill {
			return nil, false
		}
	}
	out := x.RawVector().Data
	for _, v := range out {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return nil, false
		}
	}
	return out, true
}

// slopes of every law with the temperature of both its ends, in W/K, by
// central differences over a ten-thousandth of the temperature difference.
func (b *Balance) slopes(s *state) [][2]float64 {
	out := make([][2]float64, len(b.Links))
	for i, l := range b.Links {
		dt := math.Abs(s.excess[l.From] - s.excess[l.To])
		h := math.Max(1e-4*dt, 1e-10*b.ref)
		d1 := (b.through(l, s, h, 0) - b.through(l, s, -h, 0)) / (2 * h)
		d2 := (b.through(l, s, 0, h) - b.through(l, s, 0, -h)) / (2 * h)
		out[i] = [2]float64{math.Max(d1, 0), math.Min(d2, 0)}
	}
	return out
}

// step is the change of the unknown temperatures that would bring the heat left
// over to zero if every law had the given slopes with both its ends.
func (b *Balance) step(s *state, slopes [][2]float64, unknown []Node) ([]float64, bool) {
	at := b.positions(unknown)
	n := len(unknown)
	j := mat.NewDense(n, n, nil)
	r := mat.NewVecDense(n, nil)
	for i, u := range unknown {
		r.SetVec(i, s.rest[u])
	}
	add := func(row, col int, v float64) {
		if row >= 0 && col >= 0 {
			j.Set(row, col, j.At(row, col)+v)
		}
	}
	for k, l := range b.Links {
		f, t := at[l.From], at[l.To]
		add(f, f, slopes[k][0])
		add(f, t, slopes[k][1])
		add(t, f, -slopes[k][0])
		add(t, t, -slopes[k][1])
	}
	return solveDense(j, r)
}

// accelerated iterates with slopes until the balance closes to rounding.
func (b *Balance) accelerated(s *state, unknown []Node) ([]Step, bool) {
	var steps []Step
	br := newBracket(-b.ref * (1 - coldest))
	trial := b.newState()
	for n := 1; n <= maxSteps; n++ {
		_, rest := b.worst(s)
		if b.closed(s) {
			return append(steps, Step{N: n, Closure: rest}), true
		}
		slopes := b.slopes(s)
		dx, ok := b.step(s, slopes, unknown)
		if len(unknown) == 1 {
			br.tighten(s.excess[unknown[0]], s.rest[unknown[0]])
			dx, ok = []float64{br.inside(s.excess[unknown[0]], dx, ok)}, true
		}
		if !ok {
			return steps, false
		}
		change := b.advance(s, trial, unknown, dx)
		steps = append(steps, Step{N: n, Closure: rest, Change: change})
		if change == 0 {
			return steps, false
		}
	}
	return steps, false
}

// closed tells whether every unknown node balances to the tolerance or to the
// last bit of its flows.
func (b *Balance) closed(s *state) bool {
	limit := tolerance * b.scale(s)
	noise := b.roundoff(s)
	for i, n := range b.nodes {
		if !n.fixed && math.Abs(s.rest[i]) > limit && math.Abs(s.rest[i]) > noise[i] {
			return false
		}
	}
	return true
}

// advance takes the step, halved until the heat left over shrinks, and returns
// the largest change in K; 0 when no fraction of the step helps. The lone
// unknown is guarded by its bracket instead and always moves.
func (b *Balance) advance(s, trial *state, unknown []Node, dx []float64) float64 {
	before := norm(s, unknown)
	for part := 1.0; part > 1e-6; part /= 2 {
		trial.copyFrom(s)
		change := 0.0
		for i, n := range unknown {
			step := b.notTooFar(s.excess[n], part*dx[i])
			trial.move(n, step)
			change = math.Max(change, math.Abs(step))
		}
		b.evaluate(trial)
		if len(unknown) == 1 || norm(trial, unknown) < before {
			s.copyFrom(trial)
			return change
		}
	}
	return 0
}

// notTooFar shortens a step so that the absolute temperature falls to a quarter
// at most: laws are only known to be smooth well above absolute zero.
func (b *Balance) notTooFar(excess, dx float64) float64 {
	lowest := math.Max((b.ref+excess)/4, coldest*b.ref)
	return math.Max(dx, lowest-(b.ref+excess))
}

func norm(s *state, unknown []Node) float64 {
	sum := 0.0
	for _, n := range unknown {
		sum += s.rest[n] * s.rest[n]
	}
	return math.Sqrt(sum)
}

// bracket holds the only root of one falling function between two excess
// temperatures.
type bracket struct{ low, high float64 }

func newBracket(floor float64) *bracket { return &bracket{low: floor, high: math.Inf(1)} }

// tighten moves an end to x: heat left over means the root is above.
func (k *bracket) tighten(x, rest float64) {
	if rest > 0 {
		k.low = math.Max(k.low, x)
	} else {
		k.high = math.Min(k.high, x)
	}
}

// inside is the proposed step, or one to the middle of the bracket when the
// step would leave it.
func (k *bracket) inside(x float64, dx []float64, ok bool) float64 {
	if ok && x+dx[0] > k.low && x+dx[0] < k.high {
		return dx[0]
	}
	if math.IsInf(k.high, 1) {
		return math.Max(2*math.Abs(x), 1)
	}
	return (k.low+k.high)/2 - x
}
