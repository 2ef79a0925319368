package limit

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"stillair/radiation/catalogue"
)

// Contact times in seconds that bound the burn thresholds.
const (
	// ShortestContact is the shortest contact of the scope of ISO 13732-1.
	ShortestContact = 0.5
	// LongestContact is 8 h; the threshold of longer contact is the same.
	LongestContact = 28800
)

// Threshold is the burn threshold of a surface for one contact time: the
// temperature at which a superficial burn can begin.
type Threshold struct {
	K        float64  // lower edge of the band in kelvin: below it no burn is expected
	UpperK   float64  // upper edge in kelvin: above it a burn is expected
	HasUpper bool     // the upper edge is known
	Material string   // surface material as TouchMaterials names it
	Contact  float64  // contact time in s
	Steps    []string // how K was found, to redo with a pocket calculator
	Rows     []string // ids of the table rows used
	Source   string   // standards of the rows, as quoted
	// Confidence is the lowest of the rows used.
	Confidence string

	derived bool // by interpolation or with a coating
}

// surface is a material of the touch table.
type surface struct {
	name  string
	rows  []string // ids of its burn thresholds, shortest contact first
	alias []string
}

// bare is also the base of coated metal.
var bare = surface{"bare metal", []string{"BT-bm-0.5", "BT-bm-1", "BT-bm-10", "BT-bm-60", "BT-bm-600", "BT-bm-28800"}, []string{"uncoated metal", "metal uncoated"}}

var surfaces = []surface{
	bare,
	{coated, nil, []string{"metal coated", "painted metal"}},
	{"ceramic, glass, stone", []string{"BT-cg-0.5", "BT-cg-1", "BT-cg-60", "BT-cg-600", "BT-cg-28800"}, []string{"ceramic", "glass", "stone"}},
	{"plastic", []string{"BT-pl-0.5", "BT-pl-1", "BT-pl-60", "BT-pl-600", "BT-pl-28800"}, nil},
	{"wood", []string{"BT-wd-0.5", "BT-wd-1", "BT-wd-60", "BT-wd-600", "BT-wd-28800"}, nil},
}

const coated = "coated metal"

// TouchMaterials lists the surface materials that Touch knows.
func TouchMaterials() []string {
	var names []string
	for _, s := range surfaces {
		names = append(names, s.name)
	}
	return names
}

// Touch is the burn threshold of EN 563:1994 / ISO 13732-1:2006 for a surface
// material and a contact time in seconds, from the quotations in the limit
// table. The lower edge of each band is taken. Between published contact times
// the threshold is linear in the logarithm of the time, a convention of this
// program, as the published curves are drawn over a logarithmic time axis.
//
// Bare metal at 10 s, 55 °C, rests on memory. It is used because it is lower
// than the interpolation between 1 s and 60 s (57.1 °C), and it makes the
// confidence low wherever it takes part.
//
// Coated metal is the bare metal plus the increment of 50 µm lacquer: 13 K at
// 0.5 s, 10 K at 1 s, none from 60 s. This gives the published thresholds at
// 1 s (75 °C) and from 60 s, and between them it is lower than interpolating
// the published thresholds of coated metal. Other coatings have other
// increments in the table, at 0.5 s only.
//
// Contact below 0.5 s is outside the scope of the standard and is an error;
// above 8 h the threshold stays at 43 °C.
func Touch(material string, contact float64) (Threshold, error) {
	s, ok := findSurface(material)
	if !ok {
		return Threshold{}, fmt.Errorf("no burn threshold for the material %q: choose one of %s", material, strings.Join(TouchMaterials(), "; "))
	}
	if !(contact >= ShortestContact) {
		return Threshold{}, fmt.Errorf("contact time %g s: burn thresholds start at %g s (scope of ISO 13732-1)", contact, ShortestContact)
	}
	t := Threshold{Material: s.name, Contact: contact, Confidence: "high"}
	base := s
	if s.name == coated {
		base = bare
	}
	lower, upper := t.interpolate(base.name+", lower edge of the band", curveOf(base.rows), contact)
	if s.name == coated {
		lower, upper = t.addCoating(lower, upper, contact)
	}
	t.dissent(lower)
	t.Source = t.standards()
	t.K = lower + Celsius0
	if !math.IsNaN(upper) {
		t.UpperK, t.HasUpper = upper+Celsius0, true
	}
	return t, nil
}

// findSurface finds a material by its name, an alias or the words of the table.
func findSurface(name string) (surface, bool) {
	want := catalogue.Normal(name)
	for _, s := range surfaces {
		if want == catalogue.Normal(s.name) || slices.Contains(s.alias, want) {
			return s, true
		}
	}
	return surface{}, false
}

// knot is a published value at a contact time in s.
type knot struct {
	time       float64
	low, high  float64 // edges of the band; high is NaN when unknown
	unit       string
	row        string // id in the limit table
	confidence string
}

// knotOf is the row of an id as a point of a curve.
func knotOf(id string) knot {
	e, _ := Find(id)
	time, _ := strconv.ParseFloat(e.Time, 64)
	k := knot{time, e.Low, math.NaN(), e.Unit, e.ID, e.Confidence}
	if e.HasHigh {
		k.high = e.High
	}
	return k
}

// curveOf gathers the rows of the table that make a curve.
func curveOf(ids []string) []knot {
	var curve []knot
	for _, id := range ids {
		curve = append(curve, knotOf(id))
	}
	return curve
}

// coatingCurve is the increment in K of 50 µm lacquer over the bare metal: the
// published one at 0.5 s, then the difference of the published thresholds.
func coatingCurve() []knot {
	curve := []knot{knotOf("BT-coat-lacquer-50")}
	for _, pair := range [][2]string{{"BT-cm-1", "BT-bm-1"}, {"BT-cm-60", "BT-bm-60"}} {
		k, base := knotOf(pair[0]), knotOf(pair[1])
		k.low, k.high, k.unit = k.low-base.low, k.high-base.high, "K"
		curve = append(curve, k)
	}
	return curve
}

// addCoating raises the threshold of the bare metal to that of coated metal.
func (t *Threshold) addCoating(low, high, contact float64) (float64, float64) {
	t.derived = true
	moreLow, moreHigh := t.interpolate("increment of 50 µm lacquer", coatingCurve(), contact)
	t.step("Coated metal is taken as bare metal under 50 µm of lacquer, the one coating with published values at more than one contact time: %.1f%s°C + %.1f%sK = %.1f%s°C.", low, space, moreLow, space, low+moreLow, space)
	return low + moreLow, high + moreHigh
}

// interpolate reads a curve at a contact time, in the unit of the curve, and
// records the rows, the confidence and the step. Beyond the last point the
// value stays.
func (t *Threshold) interpolate(what string, curve []knot, contact float64) (low, high float64) {
	i := slices.IndexFunc(curve, func(k knot) bool { return k.time >= contact })
	if i < 0 {
		last := curve[len(curve)-1]
		t.use(last)
		t.step("%s, contact longer than %s: %s as at %s.", what, seconds(last.time), last.value(), seconds(last.time))
		return last.low, last.high
	}
	b := curve[i]
	if b.time == contact {
		t.use(b)
		word := "published"
		if b.row == fromMemory {
			word = "from memory"
		}
		t.step("%s, %s for contact of %s: %s.", what, word, seconds(b.time), b.value())
		return b.low, b.high
	}
	a := curve[i-1]
	t.use(a)
	t.use(b)
	t.derived = true
	share := math.Log10(contact/a.time) / math.Log10(b.time/a.time)
	low = a.low - share*(a.low-b.low)
	high = a.high - share*(a.high-b.high)
	t.step("%s, between %s: %s and %s: %s, linear in the logarithm of the contact time: %g - %g × log10(%.4g)/log10(%.4g) = %.1f%s%s.",
		what, seconds(a.time), a.value(), seconds(b.time), b.value(),
		a.low, a.low-b.low, contact/a.time, b.time/a.time, low, space, b.unit)
	return low, high
}

// value is the lower edge with its unit.
func (k knot) value() string { return fmt.Sprintf("%g%s%s", k.low, space, k.unit) }

// fromMemory is the one row of the touch curves that was not seen in print.
const fromMemory = "BT-bm-10"

// use notes a row that takes part in the threshold.
func (t *Threshold) use(k knot) {
	t.Rows = append(t.Rows, k.row)
	t.Confidence = catalogue.LowerConfidence(t.Confidence, k.confidence)
	if k.row == fromMemory {
		t.step("The bare-metal value for %s, %s, rests on memory and was not seen in print: low confidence. It is used because it is lower than the interpolation between %s and %s without it, %.1f%s%s.",
			seconds(k.time), k.value(), seconds(1), seconds(60), withoutMemory(), space, k.unit)
	}
}

// withoutMemory is the lower edge for bare metal at 10 s that the published
// points alone would give.
func withoutMemory() float64 {
	a, b := knotOf("BT-bm-1"), knotOf("BT-bm-60")
	return a.low - (a.low-b.low)*math.Log10(10/a.time)/math.Log10(b.time/a.time)
}

// second is the other quotation of the thresholds from 1 s to 5 s, which some
// materials have. It is of low confidence and not used; see dissent.
var second = map[string][]string{
	"bare metal": {"BT-s06-metal-1", "BT-s06-metal-2", "BT-s06-metal-5"},
	"plastic":    {"BT-s06-plastic-1", "BT-s06-plastic-2", "BT-s06-plastic-5"},
	"wood":       {"BT-s06-wood-1", "BT-s06-wood-2", "BT-s06-wood-5"},
}

// dissent tells the reader where the second quotation is below the threshold.
func (t *Threshold) dissent(low float64) {
	for _, other := range curveOf(second[t.Material]) {
		if other.time == t.Contact && other.low < low {
			t.step("A second quotation of the standard (%s, %s confidence, not used) has %s at %s.",
				other.row, other.confidence, other.value(), seconds(other.time))
		}
	}
}

// standards lists the standards of the rows used.
func (t *Threshold) standards() string {
	var names []string
	for _, id := range t.Rows {
		if e, _ := Find(id); !slices.Contains(names, e.Standard) {
			names = append(names, e.Standard)
		}
	}
	how := "burn threshold as quoted from "
	if t.derived {
		how = "burn threshold derived from values of "
	}
	return how + strings.Join(names, "; ")
}

func (t *Threshold) step(format string, values ...any) {
	t.Steps = append(t.Steps, fmt.Sprintf(format, values...))
}

// seconds writes a contact time.
func seconds(t float64) string { return fmt.Sprintf("%g%ss", t, space) }
