package freeconv

import (
	"fmt"
	"math"
	"strings"

	"stillair/geometry"
)

// Evaluate gives the film on a face with every number a checker needs to redo
// it. The sign of s.DT and the facing of the face choose between the unstable
// and the stable side; Ra takes the size of the difference. A choice that does
// not fit (see Check) is answered with the default, and Why says so.
func Evaluate(f geometry.Face, s State, choice Choice) Film {
	o := solve(&f, &s, choice)
	st := tidy(&s)
	r := &o.governs
	low, high := st.Gas.Range()
	film := Film{
		Face: f.Name, Kind: o.kind, Method: r.c, Why: why(&o, choice),
		In: r.in, Ts: s.Ts, Ta: s.Ta, DT: st.DT,
		Length: r.length, LengthText: lengthText(r, &f),
		TProps: r.tProps, TBeta: 1 / r.beta, Props: r.props, Gravity: r.g,
		Gr: r.gr, Ra: r.in.Ra, Nu: r.nu, H: r.h, Regime: regime(r),
		PropsInRange: r.tProps >= low && r.tProps <= high,
	}
	if o.method.IsRule() {
		film.Rule, film.Laws = o.method, []*Correlation{r.c, o.other.c}
	}
	film.RangeNote = rangeNote(r)
	if gap := slenderGap(&o, &f); film.RangeNote == "" {
		film.RangeNote = gap
	}
	film.InRange = film.RangeNote == ""
	film.Notes = notes(&o, &f)
	return film
}

// lengthText names the characteristic length with its value to the millimetre,
// or to three digits when it is small.
func lengthText(r *result, f *geometry.Face) string {
	name := string(r.c.Length)
	switch {
	case !r.sized || r.c.Length == SqrtArea:
		name = "√A"
	case r.c.Length == Height && f.Shape == geometry.Flat && f.FromVertical() > alignment:
		name = "slope length"
	}
	if r.length < 0.1 {
		return fmt.Sprintf("%s = %s m", name, threeDigits(r.length))
	}
	return fmt.Sprintf("%s = %.3f m", name, r.length)
}

// why tells how the method came to be used.
func why(o *outcome, choice Choice) string {
	id, named := choice[o.kind]
	switch {
	case o.asked:
		return "asked for by name: " + o.method.Name
	case named:
		return fmt.Sprintf("default (the method %q asked for does not fit a %s): %s", id, o.kind, standings[o.kind].why)
	}
	return "default: " + standings[o.kind].why
}

// limitShare is the share of the conduction limit in Nu from which on it is
// worth a remark.
const limitShare = 1.0 / 3

// conductionLimit is the Nusselt number that remains in still air.
func conductionLimit(r *result) float64 {
	in := r.in
	in.Ra = 0
	return r.c.Nu(in)
}

// Published ends of the laminar and starts of the turbulent regime. Vertical
// plate: Ra = 1e9 (Incropera) to 1e10 (Cengel). Plate, unstable side: from
// 3.6^12 = 4.74e6, where 0.15 Ra^(1/3) overtakes 0.54 Ra^(1/4), to 1e7 (McAdams 1954). Horizontal cylinder: 1e9, the
// end of the laminar form of Churchill & Chu 1975.
func regimeBounds(k Kind) (laminarTo, turbulentFrom float64) {
	switch k {
	case VerticalPlate, VerticalCylinder, InclinedDown:
		return 1e9, 1e10
	case PlateUp, InclinedUp:
		return 4.74e6, 1e7
	case HorizontalCylinder:
		return 1e9, 1e9
	}
	return math.Inf(1), math.Inf(1)
}

// regime puts the flow in one word or phrase.
func regime(r *result) string {
	laminarTo, turbulentFrom := regimeBounds(r.kind)
	switch {
	case conductionLimit(r) > limitShare*r.nu:
		return "near the conduction limit"
	case r.in.Ra > turbulentFrom:
		return "turbulent"
	case r.in.Ra > laminarTo:
		return "transition"
	}
	return "laminar"
}

// prRounding is how far Pr may pass a published end before it counts: the ends
// are rounded to a digit or two, and air, Pr 0.69 to 0.72, was among what was
// measured.
const prRounding = 0.03

// rangeNote is empty when the source covers the case.
func rangeNote(r *result) string {
	c := r.c
	note := ""
	add := func(symbol string, x, low, high float64, unit string) {
		if text := outside(symbol, x, low, high, unit); text != "" {
			if note != "" {
				note += "; "
			}
			note += text
		}
	}
	add("Ra", r.in.Ra, c.RaMin, c.RaMax, "")
	add("Pr", r.in.Pr, c.PrMin*(1-prRounding), c.PrMax*(1+prRounding), "")
	if c.ThetaMin != 0 || c.ThetaMax != 0 {
		add("the tilt from the vertical", r.in.Theta, c.ThetaMin, c.ThetaMax, "°")
	}
	if !r.sized {
		if note != "" {
			note += "; "
		}
		note += fmt.Sprintf("the face has no %s: the square root of its area stands in", c.Length)
	}
	if note != "" {
		note += " (" + c.Name + ")"
	}
	return note
}

// readable writes a number with its power of ten as people print it: 3.2·10⁹.
func readable(x float64) string {
	mantissa, exponent, large := strings.Cut(plain(x), "e")
	if !large {
		return mantissa
	}
	power := strings.NewReplacer("-", "⁻", "0", "⁰", "1", "¹", "2", "²", "3", "³", "4", "⁴", "5", "⁵", "6", "⁶", "7", "⁷", "8", "⁸", "9", "⁹").Replace(exponent)
	if mantissa == "1" {
		return "10" + power
	}
	return mantissa + "·10" + power
}

// outside says by which end x is missed; high 0 means no upper end.
func outside(symbol string, x, low, high float64, unit string) string {
	switch {
	case x < low:
		return fmt.Sprintf("%s = %s%s is below %s%s, the lower end of the range", symbol, readable(x), unit, readable(low), unit)
	case high > 0 && x > high:
		return fmt.Sprintf("%s = %s%s is above %s%s, the upper end of the range", symbol, readable(x), unit, readable(high), unit)
	}
	return ""
}

// notes gathers the remarks a reader should see beside the number.
func notes(o *outcome, f *geometry.Face) []string {
	var list []string
	r := &o.governs
	if limit := conductionLimit(r); limit > limitShare*r.nu {
		list = append(list, fmt.Sprintf("Nu tends to its conduction limit %.2f", limit))
	}
	if o.method.IsRule() {
		list = append(list, fmt.Sprintf(
			"%s: the larger of two laws; %s governs with h = %s W/(m²·K), %s gives h = %s W/(m²·K)",
			o.method.Name, partName(o.kind, r), threeDigits(r.h), partName(o.kind, &o.other), threeDigits(o.other.h)))
	}
	if r.kind == VerticalCylinder {
		list = append(list, slenderNote(r, f))
	}
	if r.c == &largestUp {
		list = append(list, governingBranchUp(r.in.Ra))
	}
	if r.c.Flux {
		list = append(list, "form for uniform heat flux: the temperature difference is that of the mean wall temperature")
	}
	return list
}

// partName tells which side of a rule a law stands for.
func partName(whole Kind, r *result) string {
	switch {
	case whole == VerticalCylinder && r.c.Fits(VerticalPlate):
		return "the flat-plate law"
	case whole == VerticalCylinder:
		return "the slender-cylinder law"
	case r.kind == VerticalPlate:
		return "the vertical part (g cos θ on the slope length)"
	}
	return "the horizontal part (g sin θ on A/P)"
}

// slenderGap tells where no published law covers a slender vertical cylinder:
// the flat-plate law governs, the cylinder is too slender to be a plate, and the
// slender-cylinder law is beyond its range.
func slenderGap(o *outcome, f *geometry.Face) string {
	r := &o.governs
	if o.kind != VerticalCylinder || !o.method.IsRule() || !r.c.Fits(VerticalPlate) || !(r.gr > 0) {
		return ""
	}
	if f.Diameter >= leastDiameter(r, f) || rangeNote(&o.other) == "" {
		return ""
	}
	return fmt.Sprintf("D is less than 35 L/Gr^(1/4), too slender for a flat plate, and the slender-cylinder law is beyond its range: %s; the flat-plate value is low",
		rangeNote(&o.other))
}

// leastDiameter is 35 L/Gr^(1/4) in m.
func leastDiameter(r *result, f *geometry.Face) float64 {
	return 35 * f.Height / math.Sqrt(math.Sqrt(r.gr))
}

// slenderNote is the test D >= 35 L/Gr^(1/4) for treating a vertical cylinder
// as a flat plate, Sparrow & Gregg 1956, Trans. ASME 78:1823.
func slenderNote(r *result, f *geometry.Face) string {
	if !(r.gr > 0) {
		return "D ≥ 35 L/Gr^(1/4) cannot be tested: Gr = 0"
	}
	least := leastDiameter(r, f)
	word, then := "is at least", "the side may be taken as a flat plate"
	if f.Diameter < least {
		word, then = "is less than", "the side sheds more than a flat plate"
	}
	return fmt.Sprintf("D = %s m %s 35 L/Gr^(1/4) = %s m: %s", threeDigits(f.Diameter), word, threeDigits(least), then)
}
