package checks

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks/casefile"
	"stillair/checks/limit"
)

// criterion is one limit made ready for one load case.
type criterion struct {
	text, source, why, confidence string
	k                             float64 // K
	lower, touch                  bool
	extra                         float64               // K, uncertainty of the limit itself
	moves                         func(float64) float64 // K, how the limit moves with the air; nil: not at all
	steps                         []string
}

// judge applies every limit of the case that the purpose of the load case
// calls for.
func judge(c casefile.Case, temps []Temp, effects []Effect, dew float64) []Judged {
	var rows []Judged
	for _, l := range c.Limits {
		if !applies(l, c) {
			continue
		}
		k := makeCriterion(l, c, dew)
		for _, t := range temps {
			if meant(l.At, t) {
				rows = append(rows, k.judge(t, effects, c.Uncertainty.Air.SI))
			}
		}
	}
	return rows
}

// unjudged names the limits that no load case with a result has judged.
func unjudged(o *Outcome) []string {
	var list []string
	for i, l := range o.Loads[0].Case.Limits {
		if !slices.ContainsFunc(o.Loads, func(x LoadOutcome) bool { return x.judged(i) }) {
			k := makeCriterion(l, o.Loads[0].Case, 0)
			list = append(list, fmt.Sprintf("%s: %s", l.At, k.text))
		}
	}
	return list
}

// judged tells whether limit i of the case was applied in this load case.
func (x LoadOutcome) judged(i int) bool {
	l := x.Case.Limits[i]
	return applies(l, x.Case) && slices.ContainsFunc(x.Temps, func(t Temp) bool { return meant(l.At, t) })
}

// meant tells whether a limit at the place named is about this temperature.
func meant(at string, t Temp) bool {
	if at == "any face" {
		return t.Kind == "outer surface"
	}
	return at == t.At
}

// applies tells whether a limit is judged in a load case of this purpose:
// touch judges touch limits and limits on faces, component everything but touch
// limits, condensation lowest temperatures and the dew point, loss nothing.
// Without a purpose everything is judged, the dew point where the humidity is
// given.
func applies(l casefile.Limit, c casefile.Case) bool {
	if l.NoCondensation && !c.Surroundings.Humidity.Set {
		return false
	}
	touch := isTouch(l)
	switch c.Load.Purpose {
	case "":
		return true
	case "touch":
		return touch || !l.Least.Set && !l.NoCondensation && onFace(l.At)
	case "component":
		return !touch && !l.NoCondensation
	case "condensation":
		return l.NoCondensation || l.Least.Set
	}
	return false
}

// isTouch tells whether a limit is about a person touching a surface.
func isTouch(l casefile.Limit) bool {
	if l.Rule != "" {
		e, _ := limit.Find(l.Rule)
		return e.IsTouch()
	}
	return l.Touch != ""
}

// onFace tells whether a place is an outer surface.
func onFace(at string) bool { return at != "inside air" && at != "upper zone" && at != "contents" }

func makeCriterion(l casefile.Limit, c casefile.Case, dew float64) criterion {
	switch {
	case l.NoCondensation:
		return dewCriterion(c, dew)
	case l.Touch != "":
		return touchCriterion(l)
	case l.Rule != "":
		return ruleCriterion(l, c)
	}
	return projectCriterion(l, c)
}

// withAir is a limit that moves with the air as a rise does.
func withAir(d float64) float64 { return d }

func projectCriterion(l casefile.Limit, c casefile.Case) criterion {
	k := criterion{source: l.Source, why: l.Why}
	if k.source == "" {
		k.source = "project limit: " + l.Why
	}
	switch {
	case l.Most.Set:
		k.k, k.text = l.Most.SI, "at most "+l.Most.Typed
	case l.Least.Set:
		k.k, k.text, k.lower = l.Least.SI, "at least "+l.Least.Typed, true
	default:
		k.k, k.text, k.moves = c.Surroundings.Air.SI+l.Rise.SI, fmt.Sprintf("rise over the air of at most %s", l.Rise.Typed), withAir
	}
	k.touch = onFace(l.At) && !k.lower
	return k
}

func touchCriterion(l casefile.Limit) criterion {
	t, err := limit.Touch(l.Touch, l.Contact.SI)
	k := criterion{
		text: fmt.Sprintf("burn threshold, %s, contact %s", l.Touch, l.Contact.Typed), source: t.Source,
		why: l.Why, confidence: t.Confidence, k: t.K, touch: true, steps: t.Steps,
	}
	if err != nil { // the reader has refused such a limit already
		k.source = err.Error()
	}
	return k
}

func ruleCriterion(l casefile.Limit, c casefile.Case) criterion {
	e, _ := limit.Find(l.Rule)
	k, _ := e.Kelvin(c.Surroundings.Air.SI)
	r := criterion{
		text: e.Text(), source: fmt.Sprintf("%s; quoted from %s", e.Standard, e.Source),
		why: l.Why, confidence: e.Confidence, k: k, touch: onFace(l.At),
	}
	if e.IsRise() {
		r.moves = withAir
	}
	return r
}

func dewCriterion(c casefile.Case, dew float64) criterion {
	s := c.Surroundings
	return criterion{
		text:   fmt.Sprintf("no condensation: above the dew point of air at %s and %s relative humidity", s.Air.Typed, s.Humidity.Typed),
		source: dewPointSource, k: dew, lower: true, extra: dewUncertainty(s, c.Uncertainty.Humidity.SI),
		moves: func(d float64) float64 {
			return limit.DewPoint(s.Air.SI+d, s.Humidity.SI) - limit.DewPoint(s.Air.SI, s.Humidity.SI)
		},
	}
}

// dewUncertainty is the shift of the dew point, K, by the uncertainty of the
// humidity.
func dewUncertainty(s casefile.Surroundings, u float64) float64 {
	wet := math.Min(s.Humidity.SI+u, 1)
	return limit.DewPoint(s.Air.SI, wet) - limit.DewPoint(s.Air.SI, s.Humidity.SI)
}

// judge compares one temperature by the four-way rule. The uncertainty is that
// of the distance to the limit, on the side on which the limit lies: a rise and
// the distance to the dew point move with the air as their limit does.
func (k criterion) judge(t Temp, effects []Effect, air float64) Judged {
	plus, minus := k.uncertainty(t.At, effects, air)
	margin, u := k.k-t.K, plus
	if k.lower {
		margin = -margin
	}
	if t.K > k.k {
		u = minus
	}
	u = math.Hypot(u, k.extra)
	word, p := limit.Judge(t.K, k.k, u, k.lower)
	return Judged{
		At: t.At, Limit: k.text, Source: k.source, Why: k.why, Confidence: k.confidence, LimitK: k.k, ValueK: t.K,
		MarginK: margin, Uncertainty: u, Verdict: Verdict(word), Touch: k.touch, Lower: k.lower, Conformance: p, Steps: k.steps,
	}
}

// uncertainty combines the effects on a temperature with what the limit itself
// does when the air is shifted by its uncertainty.
func (k criterion) uncertainty(at string, effects []Effect, air float64) (plus, minus float64) {
	if k.moves == nil {
		return combine(effects, at)
	}
	var own []Effect
	for _, e := range effects {
		if e.At == at && e.Of == ofAir {
			e.UpK -= k.moves(air)
			e.DownK -= k.moves(-air)
		}
		own = append(own, e)
	}
	return combine(own, at)
}

var severity = map[Verdict]int{None: 0, NotJudged: 1, Pass: 2, ConditionalPass: 3, ConditionalFail: 4, Fail: 5, NoResult: 6}

// Rank orders verdicts from nothing judged to the worst.
func (v Verdict) Rank() int { return severity[v] }

// worse returns the graver of two verdicts.
func worse(a, b Verdict) Verdict {
	if severity[b] > severity[a] {
		return b
	}
	return a
}

// govern marks, over all load cases, the row with the least margin for every
// limit, the highest temperature of every place, and the load case that decides.
func govern(o *Outcome) {
	markTemps(o)
	best := map[string]*Judged{}
	for i := range o.Loads {
		for j := range o.Loads[i].Verdicts {
			v := &o.Loads[i].Verdicts[j]
			if key := limitKey(*v); best[key] == nil || v.MarginK < best[key].MarginK {
				best[key] = v
			}
		}
	}
	for _, v := range best {
		v.Governing = true
	}
	o.choose()
}

// limitKey names a limit apart from the place and load case it is applied to.
func limitKey(v Judged) string {
	text := v.Limit
	if i := strings.Index(text, ": above the dew point"); i > 0 {
		text = text[:i]
	}
	return text + "|" + v.Source
}

// graver tells whether a decides before b: the worse verdict, then the smaller
// margin.
func graver(a, b Judged) bool {
	if severity[a.Verdict] != severity[b.Verdict] {
		return severity[a.Verdict] > severity[b.Verdict]
	}
	return a.MarginK < b.MarginK
}

func markTemps(o *Outcome) {
	hottest := map[string]*Temp{}
	for i := range o.Loads {
		if o.Loads[i].Status != Converged {
			continue
		}
		for j := range o.Loads[i].Temps {
			t := &o.Loads[i].Temps[j]
			if hottest[t.At] == nil || t.K > hottest[t.At].K {
				hottest[t.At] = t
			}
		}
	}
	for _, t := range hottest {
		t.Governing = true
	}
}

// choose sets the verdict of the whole and the load case that decides it: the
// one of the decisive limit; without limits the one with the hottest core.
func (o *Outcome) choose() {
	o.Verdict = None
	governs, hottest := &o.Loads[0], math.Inf(-1)
	for i := range o.Loads {
		l := &o.Loads[i]
		o.Verdict = worse(o.Verdict, l.Verdict)
		if l.Status == Converged && l.Temps[0].K > hottest {
			governs, hottest = l, l.Temps[0].K
		}
	}
	if _, l := o.Deciding(); l != nil {
		governs = l
	}
	governs.Governing = true
	o.Governs = governs.Name
}

// dewPointSource cites the formula behind limit.DewPoint.
const dewPointSource = "dew point by the Magnus formula of Alduchov & Eskridge 1996, J. Appl. Meteor. 35:601-609 (coefficients from memory)"

// Deciding is the check that decides a load case: the worst verdict, then the
// smallest margin; nil when nothing was judged.
func (l *LoadOutcome) Deciding() *Judged {
	var best *Judged
	for i := range l.Verdicts {
		if v := &l.Verdicts[i]; best == nil || graver(*v, *best) {
			best = v
		}
	}
	return best
}

// Deciding is the check that decides the whole, and its load case; nil when
// nothing was judged.
func (o *Outcome) Deciding() (*Judged, *LoadOutcome) {
	var best *Judged
	var at *LoadOutcome
	for i := range o.Loads {
		if v := o.Loads[i].Deciding(); v != nil && (best == nil || graver(*v, *best)) {
			best, at = v, &o.Loads[i]
		}
	}
	return best, at
}

// Place is where a load case is looked at first: the place that decides it; with
// nothing judged the inside air or the body, and the hottest face where the
// contents set the temperature inside.
func (l *LoadOutcome) Place() string {
	if v := l.Deciding(); v != nil {
		return v.At
	}
	var at *Temp
	for i := range l.Temps {
		t := &l.Temps[i]
		if i == 0 && t.Kind != "contents" {
			return t.At
		}
		if t.Kind == "outer surface" && (at == nil || t.K > at.K) {
			at = t
		}
	}
	if at == nil {
		return ""
	}
	return at.At
}
