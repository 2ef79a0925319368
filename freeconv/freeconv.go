// Package freeconv holds published correlations of free convection as records
// that the calculation, the note, the catalogue and the tests all read, and
// evaluates the film on a face from them. It is pure: no files, no printing,
// no state. SI units; temperatures in kelvin.
package freeconv

import (
	"stillair/freeconv/fluid"
	"stillair/geometry"
)

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

// Length is the rule by which a correlation takes its characteristic length.
type Length string

// The rules for the characteristic length.
const (
	Height            Length = "height"
	AreaOverPerimeter Length = "A/P"
	Diameter          Length = "diameter"
	SqrtArea          Length = "sqrt(A)"
)

// Verification says how far the published form has been confirmed.
type Verification string

// How a published form or number was obtained.
const (
	InPrint       Verification = "seen in print"
	Transcription Verification = "seen in an open transcription"
	FromMemory    Verification = "from memory, not seen in print"
)

// Input is what the function of a correlation may depend on.
type Input struct {
	Ra float64 // Rayleigh number on the correlation's own length; the full g, unless the record says otherwise
	Pr float64 // Prandtl number
	LD float64 // height over diameter (vertical cylinders)
	// Theta is the tilt of the plate from the vertical, degrees, 0..90.
	Theta float64
}

// Correlation is one published relation Nu = f(Ra, Pr, ...) with everything a
// reader needs to judge it.
type Correlation struct {
	ID       string // short, lower case, stable: "churchill-chu-1975-plate"
	Name     string // as a person says it: "Churchill & Chu 1975, vertical plate, all Ra"
	Kinds    []Kind
	Citation string // authors, title or journal, year, volume, pages, equation
	Equation string // for the note, in the small TeX subset of the typesetter
	Length   Length

	// FilmWeight places the property temperature: T = Ta + FilmWeight (Ts - Ta).
	// 0.5 is the film temperature. BetaWeight does the same for the expansion
	// coefficient, beta = 1/T.
	FilmWeight, BetaWeight float64

	RaMin, RaMax float64 // range in which the source gives it
	PrMin, PrMax float64
	Scatter      float64 // relative, e.g. 0.20; 0 when none is published
	ScatterNote  string  // where the scatter comes from, or "none published"
	Verification Verification
	Note         string // misprints in circulation, joins, extensions, what was not verified

	// Flux marks a form for uniform heat flux.
	Flux bool

	Nu func(Input) float64
}

// Film is one evaluation: every number a checker needs to redo it.
type Film struct {
	Face       string
	Kind       Kind
	Method     *Correlation
	Why        string // why this correlation was used: default and its reason, or asked for by name
	Ts, Ta     float64
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
	Gas fluid.Gas
	P   float64 // Pa
	Ts  float64 // K, surface
	Ta  float64 // K, air away from it
	DT  float64 // K, Ts - Ta, passed apart so that small differences keep their digits
}

// Placeholders so that the contract compiles; see evaluate.go.
var _ = geometry.Face{}
