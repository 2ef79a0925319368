// Package freeconv holds published correlations of free convection as records
// that the calculation, the note, the catalogue and the tests all read, and
// evaluates the film on a face from them. It is pure: no files, no printing,
// no state that changes. SI units; temperatures in kelvin.
//
// Each publication has a file of its own that opens with the citation and
// keeps the symbols of the paper. Every record says in Verification and Note
// what was seen in print and what rests on memory. Equation numbers of the
// papers are not quoted, because the papers themselves were not at hand.
//
// Out of scope: gaps and channels, fins, forced and mixed flow, and the
// influence of one face on the air at the next.
package freeconv

import "stillair/freeconv/fluid"

// StandardGravity is the conventional acceleration of free fall, m/s²
// (3rd CGPM, 1901).
const StandardGravity = 9.80665

// Kind is a situation a correlation was published for.
type Kind string

// The situations of free convection outside (and inside) a body.
const (
	VerticalPlate      Kind = "vertical plate"
	PlateUp            Kind = "horizontal plate, unstable side" // hot facing up or cold facing down
	PlateDown          Kind = "horizontal plate, stable side"   // hot facing down or cold facing up
	InclinedUp         Kind = "inclined plate, unstable side"
	InclinedDown       Kind = "inclined plate, stable side"
	HorizontalCylinder Kind = "horizontal cylinder"
	VerticalCylinder   Kind = "vertical cylinder"
	Sphere             Kind = "sphere"
	AnyShape           Kind = "body of any shape"
)

// Kinds lists every Kind in the order of a catalogue.
func Kinds() []Kind {
	return []Kind{VerticalPlate, PlateUp, PlateDown, InclinedUp, InclinedDown,
		HorizontalCylinder, VerticalCylinder, Sphere, AnyShape}
}

// Length is the rule by which a correlation takes its characteristic length.
type Length string

// The rules for the characteristic length.
const (
	Height            Length = "height" // slope length of an inclined plate
	AreaOverPerimeter Length = "A/P"
	Diameter          Length = "diameter"
	SqrtArea          Length = "sqrt(A)"
	MeanSide          Length = "mean side"    // mean of the two sides; 0.9 D of a disc
	ShortSide         Length = "shorter side" // D of a disc
)

// Verification says how far the published form has been confirmed.
type Verification string

// How a published form or number was obtained.
const (
	InPrint    Verification = "seen in print"
	Retyped    Verification = "seen in an open re-typed copy"
	FromMemory Verification = "from memory, not seen in print"
)

// Input is what the function of a correlation may depend on.
type Input struct {
	Ra float64 // Rayleigh number on the correlation's own length, with g, or g cos(theta) if the record has CosG
	Pr float64 // Prandtl number
	LD float64 // height over diameter (vertical cylinders)
	// Theta is the tilt of the plate from the vertical, degrees, 0..90.
	Theta float64
	// AP is A/P over the slope length (inclined plates).
	AP float64
}

// Correlation is one published relation Nu = f(Ra, Pr, ...) with everything a
// reader needs to judge it. Records are shared: treat them as read-only.
type Correlation struct {
	ID       string // short, lower case, stable: "churchill-chu-1975-plate"
	Name     string // as a person says it: "Churchill & Chu 1975, vertical plate, all Ra"
	Kinds    []Kind
	Citation string // authors, title or journal, year, volume, pages, equation
	Equation string // for the note, in the small TeX subset of the typesetter; where it needs several equations, one to a line
	Length   Length

	// FilmWeight places the property temperature: T = Ta + FilmWeight (Ts - Ta).
	// 0.5 is the film temperature. BetaWeight does the same for the expansion
	// coefficient, beta = 1/T.
	FilmWeight, BetaWeight float64

	RaMin, RaMax       float64 // range in which the source gives it; RaMax 0: no upper end given
	PrMin, PrMax       float64 // the same for Pr; PrMax 0: no upper end given
	ThetaMin, ThetaMax float64 // tilt from the vertical, degrees; both 0 when tilt does not enter
	// CosG says that Ra, and so RaMin and RaMax, take g cos(theta) for g.
	CosG bool

	Scatter      float64 // relative, e.g. 0.20; 0 when none is published
	ScatterNote  string  // where the scatter comes from, or "none published"
	Verification Verification
	Note         string // misprints in circulation, joins, extensions, what was not verified

	// Flux marks a form for uniform heat flux; the temperature difference is
	// then that of the mean wall temperature.
	Flux bool

	Nu func(Input) float64 `json:"-"`
	// Substitute gives Equation with numbers in place of the symbols, in the
	// same TeX subset.
	Substitute func(Input) string `json:"-"`

	// parts makes the record a rule: the larger h of the two laws counts.
	parts func(Choice) (first, second part)
}

// RaRange is the published range of Ra in words: "0.1 to 1e12".
func (c *Correlation) RaRange() string { return span(c.RaMin, c.RaMax) }

// PrRange is the published range of Pr in words: "all", "from 0.7".
func (c *Correlation) PrRange() string { return span(c.PrMin, c.PrMax) }

func span(low, high float64) string {
	switch {
	case high == 0 && low == 0:
		return "all"
	case high == 0:
		return "from " + plain(low)
	case low == 0:
		return "up to " + plain(high)
	}
	return plain(low) + " to " + plain(high)
}

// IsRule reports whether the record is a rule that takes the larger h of two
// other records.
func (c *Correlation) IsRule() bool { return c.parts != nil }

// Fits reports whether the record was published for the kind.
func (c *Correlation) Fits(k Kind) bool {
	for _, own := range c.Kinds {
		if own == k {
			return true
		}
	}
	return false
}

// Film is one evaluation: every number a checker needs to redo it.
type Film struct {
	Face   string
	Kind   Kind
	Method *Correlation // the law whose equation gave Nu
	// Rule is the record that chose Method as the larger of two laws, on
	// inclined plates and vertical cylinders; otherwise nil.
	Rule *Correlation
	// Laws are the two laws that Rule compared, the one that governs first.
	Laws       []*Correlation
	Why        string // why this correlation was used: default and its reason, or asked for by name
	In         Input  // what went into Method.Nu and Method.Substitute
	Ts, Ta, DT float64
	Length     float64 // m
	LengthText string  // "A/P = 0.109 m"
	TProps     float64 // K, where the properties were taken
	TBeta      float64 // K, 1/beta
	Props      fluid.Properties
	Gravity    float64 // m/s², the component in use (g cos theta on an inclined plate)
	Gr, Ra, Nu float64
	H          float64 // W/(m²·K)
	Regime     string  // "laminar", "turbulent", "transition", "near the conduction limit", ...
	InRange    bool
	// RangeNote says what is out of range and by how much; empty when in range.
	RangeNote string
	// PropsInRange is false when the property temperature left the range of
	// the gas equations.
	PropsInRange bool
	// Notes carries further remarks, such as the slender-cylinder test.
	Notes []string
}

// Choice names correlations to use instead of the defaults, by kind.
type Choice map[Kind]string

// State is the air and surface state for one evaluation.
type State struct {
	Gas fluid.Gas // nil: fluid.Air
	P   float64   // Pa
	Ts  float64   // K, surface
	Ta  float64   // K, air away from it
	DT  float64   // K, Ts - Ta, passed apart so that small differences keep their digits
}
