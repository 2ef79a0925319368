package balance

import "math"

// Node points to a node of one Balance.
type Node int

// Law is the heat in W that flows from the first end of a link to the second,
// at temperatures t1 and t2 in kelvin. dt is t1 - t2, handed over apart so
// that small differences keep all their digits. A law must rise with t1, fall
// with t2, and be continuous.
type Law func(dt, t1, t2 float64) float64

// Link joins two nodes by a law.
type Link struct {
	From, To Node
	By       string // "convection", "radiation", "conduction"
	law      Law
}

type node struct {
	name   string
	fixed  bool
	excess float64 // K above the reference, of fixed nodes
	source float64 // W
}

// Balance is a set of nodes and links. Temperatures are held as excess over
// the reference temperature, because a body a millionth of a kelvin above its
// surroundings cannot be told from them in absolute temperatures.
type Balance struct {
	ref   float64
	nodes []node
	Links []Link
}

// New starts a balance whose excess temperatures count from ref (K), best the
// air temperature.
func New(ref float64) *Balance { return &Balance{ref: ref} }

// Fixed adds a node at a known temperature (K).
func (b *Balance) Fixed(name string, t float64) Node {
	b.nodes = append(b.nodes, node{name: name, fixed: true, excess: t - b.ref})
	return Node(len(b.nodes) - 1)
}

// Unknown adds a node whose temperature is to be found.
func (b *Balance) Unknown(name string) Node {
	b.nodes = append(b.nodes, node{name: name})
	return Node(len(b.nodes) - 1)
}

// Source adds heat (W) to a node.
func (b *Balance) Source(n Node, w float64) { b.nodes[n].source += w }

// SourceOf is the heat (W) put into a node.
func (b *Balance) SourceOf(n Node) float64 { return b.nodes[n].source }

// Name of a node.
func (b *Balance) Name(n Node) string { return b.nodes[n].name }

// Connect joins two nodes by a law.
func (b *Balance) Connect(from, to Node, by string, law Law) {
	b.Links = append(b.Links, Link{From: from, To: to, By: by, law: law})
}

// state is one set of temperatures under trial. The excess of a node is the sum
// excess + low: low holds the digits that no longer fit. A sheet of metal
// carries watts at a difference of a millionth of a kelvin, so its balance
// cannot close on the digits of one number.
type state struct {
	excess []float64 // of every node
	low    []float64
	heat   []float64 // through every link
	rest   []float64 // W left over at every node: sources plus heat in minus heat out
}

func (b *Balance) newState() *state {
	s := &state{
		excess: make([]float64, len(b.nodes)),
		low:    make([]float64, len(b.nodes)),
		heat:   make([]float64, len(b.Links)),
		rest:   make([]float64, len(b.nodes)),
	}
	for i, n := range b.nodes {
		s.excess[i] = n.excess
	}
	return s
}

func (s *state) copyFrom(o *state) {
	copy(s.excess, o.excess)
	copy(s.low, o.low)
	copy(s.heat, o.heat)
	copy(s.rest, o.rest)
}

// through evaluates a link with its ends shifted by d1 and d2 kelvin.
func (b *Balance) through(l Link, s *state, d1, d2 float64) float64 {
	x1, x2 := s.excess[l.From], s.excess[l.To]
	return l.law((x1-x2)+(s.low[l.From]-s.low[l.To])+(d1-d2), b.ref+x1+d1, b.ref+x2+d2)
}

// move adds dx to the excess of a node without losing its last digits (exact
// sum of two numbers: Knuth, The Art of Computer Programming, vol. 2, 4.2.2).
func (s *state) move(n Node, dx float64) {
	x, dx := s.excess[n], dx+s.low[n]
	sum := x + dx
	back := sum - x
	s.excess[n], s.low[n] = sum, (x-(sum-back))+(dx-back)
}

// evaluate fills heat and rest from the excess temperatures.
func (b *Balance) evaluate(s *state) {
	for i, n := range b.nodes {
		s.rest[i] = n.source
	}
	for i, l := range b.Links {
		q := b.through(l, s, 0, 0)
		s.heat[i] = q
		s.rest[l.From] -= q
		s.rest[l.To] += q
	}
}

// scale is the heat against which a balance is judged: the sum of all sources
// or the largest flow, whichever is more.
func (b *Balance) scale(s *state) float64 {
	sources := 0.0
	for _, n := range b.nodes {
		sources += math.Abs(n.source)
	}
	for _, q := range s.heat {
		sources = math.Max(sources, math.Abs(q))
	}
	return sources
}

// worst is the unknown node with the most heat left over, and that heat.
func (b *Balance) worst(s *state) (Node, float64) {
	at, most := Node(0), 0.0
	for i, n := range b.nodes {
		if r := math.Abs(s.rest[i]); !n.fixed && r >= most {
			at, most = Node(i), r
		}
	}
	return at, most
}

// roundoff is the heat at a node that the last bit of its flows stands for; no
// iteration can close a node any better.
func (b *Balance) roundoff(s *state) []float64 {
	const eps = 2.3e-16
	r := make([]float64, len(b.nodes))
	for i, l := range b.Links {
		w := 8 * eps * math.Abs(s.heat[i])
		r[l.From] += w
		r[l.To] += w
	}
	return r
}
