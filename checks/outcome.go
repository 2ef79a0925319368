// Package checks is the design check: it turns a case into a heat balance,
// solves it, and judges the temperatures against limits with their
// uncertainty. Everything that shows a result (table, JSON, note, page) reads
// the Outcome made here.
package checks

import (
	"stillair/checks/casefile"
	"stillair/checks/material"
	"stillair/freeconv"
)

// Program identifies who computed an outcome.
type Program struct {
	Name    string `json:"name"`
	Version string `json:"version"`
	Data    string `json:"data"` // version of the embedded data: hash of the tables
}

// Outcome is the whole result of a check. Its JSON form is the machine
// contract: fields are only ever added.
type Outcome struct {
	Schema   string        `json:"schema"` // "stillair.check/1"
	Case     CaseID        `json:"case"`
	Program  Program       `json:"program"`
	Loads    []LoadOutcome `json:"loads"`
	Verdict  Verdict       `json:"verdict"`
	Governs  string        `json:"governing_load"`
	Cautions []string      `json:"cautions,omitempty"` // present whenever a touch limit was judged
	// Unjudged lists limits of the case that no load case judged, because of
	// their purposes or because the place is covered everywhere.
	Unjudged    []string         `json:"unjudged_limits,omitempty"`
	Assumptions []string         `json:"assumptions"` // what the model takes for granted
	Assumed     []casefile.Input `json:"-"`           // inputs nobody typed
	File        *casefile.File   `json:"-"`
}

// CaseID names the case and the bytes it was read from.
type CaseID struct {
	Title  string `json:"title"`
	Tag    string `json:"tag"`
	SHA256 string `json:"sha256"`
}

// Status of a solve.
type Status string

// The ways a solve ends.
const (
	Converged       Status = "converged"
	Impossible      Status = "impossible"
	OutOfProperties Status = "out of property range"
	NotConverged    Status = "not converged"
)

// Verdict words of the four-way guard-banded rule, ILAC-G8:09/2019, 4.2.3.
type Verdict string

// From best to worst. None means nothing was judged; NoResult that a load case
// has no valid result to judge.
const (
	Pass            Verdict = "pass"
	ConditionalPass Verdict = "conditional pass"
	ConditionalFail Verdict = "conditional fail"
	Fail            Verdict = "fail"
	None            Verdict = "no limit given"
	NoResult        Verdict = "no result"
	NotJudged       Verdict = "not judged" // limits are given, but none for the purpose of this load case
)

// LoadOutcome is the result of one load case.
type LoadOutcome struct {
	Name       string     `json:"name"`
	Purpose    string     `json:"purpose,omitempty"`
	Status     Status     `json:"status"`
	Message    string     `json:"message,omitempty"` // names the surface when the status is not converged
	Iterations int        `json:"iterations"`
	ClosureW   float64    `json:"closure_W"`   // largest heat left over at any node, W
	HeatW      float64    `json:"heat_W"`      // heat that leaves the body to air and surroundings, net of sun
	HeatPlusW  float64    `json:"heat_plus_W"` // its uncertainty, about two standard deviations
	HeatMinusW float64    `json:"heat_minus_W"`
	HeatPerM   float64    `json:"heat_W_per_m,omitempty"` // of a pipe
	Governing  bool       `json:"governing"`
	Temps      []Temp     `json:"temperatures"`
	Heat       []HeatPath `json:"heat"`
	Films      []FilmRow  `json:"films"`
	Layers     []LayerRow `json:"layers"`
	Verdicts   []Judged   `json:"verdicts"`
	Verdict    Verdict    `json:"verdict"` // the gravest of Verdicts

	Record     []Iteration      `json:"-"` // iteration record
	CrossCheck CrossCheck       `json:"cross_check"`
	Effects    []Effect         `json:"effects,omitempty"` // one-at-a-time shifts behind the uncertainty
	Second     *SecondMethod    `json:"second_method,omitempty"`
	Case       casefile.Case    `json:"-"`
	PressurePa float64          `json:"pressure_Pa"`
	DewPointK  float64          `json:"dew_point_K,omitempty"`
	Notes      []string         `json:"notes,omitempty"`
	Changed    []casefile.Input `json:"-"`
}

// Temp is one reported temperature.
type Temp struct {
	At        string  `json:"at"`
	K         float64 `json:"K"`
	MinusK    float64 `json:"minus_K"`
	PlusK     float64 `json:"plus_K"`
	Kind      string  `json:"kind"` // "air", "zone", "outer surface", "inner surface", "interface", "contents", "body"
	Governing bool    `json:"governing"`
}

// HeatPath is the heat through one link, positive From -> To.
type HeatPath struct {
	From  string  `json:"from"`
	To    string  `json:"to"`
	By    string  `json:"by"` // "convection", "radiation", "conduction", "sun", "source"
	W     float64 `json:"W"`
	Share float64 `json:"share"` // of all heat exchanged with air and surroundings, 0..1; final paths only
	Final bool    `json:"final"` // reaches air or surroundings
}

// LayerRow is the conduction through one layer of one face.
type LayerRow struct {
	At         string  `json:"at"`
	Place      string  `json:"place"` // "wall", "layer 1", ...
	Material   string  `json:"material"`
	ThicknessM float64 `json:"thickness_m"`
	FactorM    float64 `json:"shape_factor_m"` // Q = k S (T1 - T2)
	K          float64 `json:"k_mean_W_mK"`    // mean conductivity between both sides
	InnerK     float64 `json:"inner_K"`
	OuterK     float64 `json:"outer_K"`
	W          float64 `json:"W"`
	InRange    bool    `json:"in_range"`                 // of the conductivity table
	AreaM2     float64 `json:"area_m2,omitempty"`        // plane layers: mean of both sides
	LengthM    float64 `json:"length_m,omitempty"`       // cylinders
	InnerM     float64 `json:"inner_radius_m,omitempty"` // cylinders and spheres
	OuterM     float64 `json:"outer_radius_m,omitempty"`

	Solid *material.Material `json:"-"` // nil when the conductivity was typed
}

// FilmRow is one film as the contract shows it.
type FilmRow struct {
	At       string   `json:"at"`
	Side     string   `json:"side"` // "outside" or "inside"
	Method   string   `json:"method"`
	MethodID string   `json:"method_id"`
	Source   string   `json:"source"`
	Why      string   `json:"why"`
	LengthM  float64  `json:"length_m"`
	Length   string   `json:"length"`
	FilmK    float64  `json:"film_K"`
	Gr       float64  `json:"Gr"`
	Ra       float64  `json:"Ra"`
	Pr       float64  `json:"Pr"`
	Nu       float64  `json:"Nu"`
	H        float64  `json:"h_W_m2K"`
	AreaM2   float64  `json:"area_m2"`
	W        float64  `json:"W"`
	Regime   string   `json:"regime"`
	InRange  bool     `json:"in_range"`
	Range    string   `json:"range_note,omitempty"`
	Notes    []string `json:"notes,omitempty"`

	// Of outside films: the other heats of the same face.
	Emissivity  float64 `json:"emissivity"` // inside: the effective one between equipment and wall
	RadiantK    float64 `json:"radiant_K"`  // inside: the inside air
	RadiationW  float64 `json:"radiation_W"`
	SunWm2      float64 `json:"sun_W_m2,omitempty"`
	Absorptance float64 `json:"absorptance,omitempty"`
	SunW        float64 `json:"sun_W,omitempty"`

	Film freeconv.Film `json:"-"`
}

// Judged is one limit applied to one temperature in one load case.
type Judged struct {
	At          string  `json:"at"`
	Limit       string  `json:"limit"` // in words: "at most 55 °C"
	Source      string  `json:"source"`
	Why         string  `json:"why,omitempty"`
	Confidence  string  `json:"confidence,omitempty"`
	LimitK      float64 `json:"limit_K"`
	ValueK      float64 `json:"value_K"`
	MarginK     float64 `json:"margin_K"` // positive on the good side
	Uncertainty float64 `json:"uncertainty_K"`
	Verdict     Verdict `json:"verdict"`
	Touch       bool    `json:"touch"`
	Lower       bool    `json:"lower_limit"` // the temperature must stay above
	Governing   bool    `json:"governing"`
	// Conformance is the probability that the limit is met, normal law,
	// with uncertainty_K read as two standard deviations.
	Conformance float64  `json:"conformance_probability"`
	Steps       []string `json:"steps,omitempty"` // how a threshold was interpolated
}

// Iteration is one line of the iteration record.
type Iteration struct {
	N        int     `json:"n"`
	ClosureW float64 `json:"closure_W"`
	ChangeK  float64 `json:"change_K"`
}

// CrossCheck is the agreement with plain damped substitution.
type CrossCheck struct {
	Iterations int     `json:"iterations"`
	MaxDiffK   float64 `json:"max_difference_K"`
	Agrees     bool    `json:"agrees"`
}

// Effect is the change of one temperature under one shift.
type Effect struct {
	At     string  `json:"at"`
	Of     string  `json:"of"`     // "heat", "emissivity outside", "Churchill & Chu 1975 ..."
	Shift  string  `json:"shift"`  // "+10 %", "0.87 .. 0.95"
	UpK    float64 `json:"up_K"`   // change when shifted one way
	DownK  float64 `json:"down_K"` // and the other
	Source string  `json:"source"`
}

// SecondMethod is the same balance with another published set of correlations.
type SecondMethod struct {
	// Verdicts are the checks of this load case judged with the temperatures of
	// the second method and the uncertainty of the first.
	Verdicts []SecondVerdict `json:"verdicts"`
	Films    []FilmRow       `json:"films"`
	HeatW    float64         `json:"heat_W"`
	Methods  []string        `json:"methods"`
	Rows     []SecondRow     `json:"rows"`
	Status   Status          `json:"status"`
}

// SecondRow compares one temperature.
type SecondRow struct {
	At     string  `json:"at"`
	FirstK float64 `json:"first_K"`
	K      float64 `json:"K"`
	DiffK  float64 `json:"difference_K"`
}

// SecondVerdict is one check under both methods.
type SecondVerdict struct {
	At     string  `json:"at"`
	Limit  string  `json:"limit"`
	First  Verdict `json:"first"`
	Second Verdict `json:"second"`
	ValueK float64 `json:"value_K"` // by the second method
	LimitK float64 `json:"limit_K"`
	U      float64 `json:"uncertainty_K"` // of the first method
}

// Changed lists the checks whose verdict word the second method changes.
func (s *SecondMethod) Changed() []SecondVerdict {
	if s == nil {
		return nil
	}
	var list []SecondVerdict
	for _, v := range s.Verdicts {
		if v.First != v.Second {
			list = append(list, v)
		}
	}
	return list
}
