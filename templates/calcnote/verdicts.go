package calcnote

import (
	"fmt"
	"math"
	"strings"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/limit"
	"stillair/checks/unit"
	"stillair/templates/drawing"
	"stillair/templates/pdf"
	"stillair/templates/plot"
)

// checks compares with the limits.
func (n *note) checks() {
	n.sectionRoom("Checks against limits", 50)
	groups := n.limits()
	if s := n.unjudged(); s != "" {
		n.runs(pdf.Run{Text: s, Face: pdf.Bold})
	}
	if len(groups) == 0 {
		n.text("No limit was judged: the case gives none that applies to a load case with a result.")
		return
	}
	n.cited(limit.DecisionRule, ilacSource, jcgm106Source)
	n.text("The probability that a limit is met counts the uncertainty of the calculated temperature only, not that of the limit. Bold rows govern: the smallest margin for that limit over all load cases.")
	n.margins()
	var rows []pdf.Row
	for _, g := range groups {
		rows = append(rows, n.limitRows(g)...)
	}
	n.table([]pdf.Column{
		{Head: "Load case", Width: 29}, {Head: "At", Width: 24}, {Head: "Limit", Width: 16, Align: pdf.AlignRight}, {Head: "Calculated ± U", Width: 33, Align: pdf.AlignRight},
		{Head: "Margin", Width: 18, Align: pdf.AlignRight}, {Head: "Verdict", Width: 32}, {Head: "Probability", Width: 19, Align: pdf.AlignRight}}, rows)
	n.small("Margins are taken from unrounded values.")
	n.thresholds(groups)
	n.conclusion()
}

// margins is the plot of the checks with its caption.
func (n *note) margins() {
	const least = 0.85 // of the height with comfortable lines
	if s, ok := plot.Margins(n.o, n.width(), n.pictureHeight(plot.MarginsHeight(n.o), least)); ok {
		n.scene(s, "The checks at a glance. "+plot.MarginsCaption)
	}
}

// judgedRow is one verdict with its load case.
type judgedRow struct {
	load string
	v    checks.Judged
}

// limits groups the verdicts by limit.
func (n *note) limits() [][]judgedRow {
	var keys []string
	byKey := map[string][]judgedRow{}
	for _, l := range n.o.Loads {
		for _, v := range l.Verdicts {
			key := v.Limit + "|" + v.Source
			if byKey[key] == nil {
				keys = append(keys, key)
			}
			byKey[key] = append(byKey[key], judgedRow{l.Name, v})
		}
	}
	var groups [][]judgedRow
	for _, k := range keys {
		groups = append(groups, byKey[k])
	}
	return groups
}

func (n *note) limitRows(g []judgedRow) []pdf.Row {
	first := g[0].v
	head := capital(minus(first.Limit)) + ": " + shortSource(first.Source)
	if !strings.HasPrefix(first.Source, "project limit") {
		head += " " + n.refs.marks(first.Source)
	}
	if first.Why != "" && !strings.Contains(first.Source, first.Why) {
		head += "  (" + first.Why + ")"
	}
	if first.Confidence != "" && first.Confidence != "high" {
		head += "; confidence in the quotation: " + first.Confidence
	}
	rows := []pdf.Row{{Cells: []pdf.Cell{pdf.C("")}, Span: pdf.T(head), Strong: true}}
	for _, j := range g {
		v := j.v
		r := cells(j.load, v.At, n.temp(v.LimitK), n.pm(v.ValueK, v.Uncertainty), n.diff(v.MarginK), "", percent(v.Conformance))
		r.Cells[5] = pdf.Cell{Runs: verdictRuns(v.Verdict)}
		if v.Governing {
			r.Shade = true
			for i := range r.Cells {
				r.Cells[i].Face = pdf.Bold
			}
		}
		rows = append(rows, r)
	}
	return rows
}

// percent is a probability that never pretends to be certain.
func percent(p float64) string {
	switch {
	case math.IsNaN(p):
		return notComputed
	case p > 0.999:
		return ">\u00A099.9\u00A0%"
	case p < 0.001:
		return "<\u00A00.1\u00A0%"
	}
	return fmt.Sprintf("%.1f\u00A0%%", 100*p)
}

// thresholds prints how touch limits were found.
func (n *note) thresholds(groups [][]judgedRow) {
	for _, g := range groups {
		v := g[0].v
		if len(v.Steps) == 0 {
			continue
		}
		n.d.Need(2 * bodyStyle.Leading())
		n.textf("How the limit “%s” was found:", v.Limit)
		for _, s := range v.Steps {
			n.bullet(capital(s))
		}
	}
}

// conclusion answers each question of the case in one sentence.
func (n *note) conclusion() {
	n.part("Conclusion", 20)
	n.runs(append([]pdf.Run{{Inline: sign{n.o.Verdict}}, {Text: capital(string(n.o.Verdict)) + ". ", Face: pdf.Bold}}, prose(strings.Join(n.verdictSentences(), " "))...)...)
	for _, s := range n.answers() {
		n.bullet(s)
	}
	switch {
	case n.burnJudged():
		if n.uncertainThreshold() {
			n.text(lowConfidence)
		}
		n.text("A verdict on a burn threshold is a comparison with a quoted number, not a statement about persons. Local codes and the practice of licensed engineers come first; see the cautions.")
	case len(n.o.Cautions) > 0:
		n.text(noBurnThreshold + " Local codes and the practice of licensed engineers come first; see the cautions.")
	}
}

const noBurnThreshold = "No burn threshold was asked for; the limit on a face is not one."

// answers are one sentence for each kind of limit, one for the heat and one for
// what the second method would change.
func (n *note) answers() []string {
	var list []string
	for _, kind := range limitKinds {
		only := checks.Outcome{}
		for _, l := range n.o.Loads {
			only.Loads = append(only.Loads, checks.LoadOutcome{Name: l.Name, Verdicts: ofKind(l, kind)})
		}
		if v, l := only.Deciding(); v != nil {
			list = append(list, fmt.Sprintf("%s: %s; smallest margin %s, %s at %s against %s, load case “%s”.",
				capital(kind), v.Verdict, n.diff(v.MarginK), v.At, n.pm(v.ValueK, v.Uncertainty), n.limitText(*v), l.Name))
		}
	}
	list = append(list, n.heatAnswer()...)
	return append(list, n.changedAnswers()...)
}

// The kinds of limits that a conclusion speaks about.
const (
	kindInside = "limits inside"
	kindFace   = "limits on faces"
	kindBurn   = "burn thresholds and touch limits"
	kindLowest = "lowest temperatures"
	kindDew    = "condensation"
)

var limitKinds = []string{kindInside, kindFace, kindBurn, kindLowest, kindDew}

// ofKind are the verdicts of one kind.
func ofKind(l checks.LoadOutcome, kind string) []checks.Judged {
	var list []checks.Judged
	for _, v := range l.Verdicts {
		if kindOf(l.Case, v) == kind {
			list = append(list, v)
		}
	}
	return list
}

// kindOf is the kind of a limit that was judged.
func kindOf(c casefile.Case, v checks.Judged) string {
	switch {
	case strings.HasPrefix(v.Limit, "no condensation"):
		return kindDew
	case v.Lower:
		return kindLowest
	case !v.Touch:
		return kindInside
	case isBurn(c, v):
		return kindBurn
	}
	return kindFace
}

// isBurn tells whether a verdict compares with a burn threshold or a quoted
// touch limit.
func isBurn(c casefile.Case, v checks.Judged) bool {
	for _, l := range c.Limits {
		if l.Touch != "" && strings.HasPrefix(v.Limit, "burn threshold") {
			return true
		}
		if e, ok := limit.Find(l.Rule); ok && l.Rule != "" && e.IsTouch() && e.Text() == v.Limit {
			return true
		}
	}
	return false
}

// burnJudged tells whether any load case judged a burn threshold.
func (n *note) burnJudged() bool {
	for _, l := range n.o.Loads {
		if len(ofKind(l, kindBurn)) > 0 {
			return true
		}
	}
	return false
}

// heatAnswer tells what the body sheds in each load case.
func (n *note) heatAnswer() []string {
	var parts []string
	for _, l := range n.o.Loads {
		if l.Status != checks.Converged {
			continue
		}
		parts = append(parts, "“"+l.Name+"” "+n.heat(l))
	}
	if len(parts) == 0 {
		return nil
	}
	net := ""
	if n.loadsWith(hasSun) != "" {
		net = ", net of sun"
	}
	return []string{"Heat that the body sheds" + net + ": " + strings.Join(parts, "; ") + "."}
}

// heat is the heat shed with its uncertainty, and per length of a pipe.
func (n *note) heat(l checks.LoadOutcome) string {
	const least = 1e-5 // of the heat, below which an uncertainty is not printed
	most := shedScale(l, throughput(l))
	s := n.watts(l.HeatW, most)
	if u := max(l.HeatPlusW, l.HeatMinusW); u > least*most {
		s = n.heatPM(l.HeatW, u, most)
	}
	if l.HeatPerM != 0 {
		s += " (" + minus(drawing.HeatText(n.sys, unit.HeatPerLength, l.HeatPerM, l.HeatPerM)) + ")"
	}
	return s
}

// shedScale is the heat that sets the decimals of the heat shed, beside others
// of which the largest is given: its own where it would print as zero, unless
// it is no more than what the balance leaves over.
func shedScale(l checks.LoadOutcome, largest float64) float64 {
	const (
		shown = 1e-4 // of the largest
		noise = 1e-8
	)
	if w := math.Abs(l.HeatW); w < shown*largest && w > noise*throughput(l) {
		return w
	}
	return largest
}

// heatPM is a heat with its uncertainty; very small and very large ones with
// powers of ten.
func (n *note) heatPM(w, u, most float64) string {
	if s := n.watts(w, most); strings.Contains(s, "·10") {
		return s + unit.NoBreak + "±" + unit.NoBreak + n.watts(u, most)
	}
	return minus(n.sys.ShowPM(unit.Power, w, u))
}

// changedAnswers tell where the second method changes a verdict, one sentence
// for each load case, limit and change.
func (n *note) changedAnswers() []string {
	var list []string
	judged := false
	for _, l := range n.o.Loads {
		judged = judged || l.Second != nil && len(l.Second.Verdicts) > 0
		list = append(list, changesOf(l)...)
	}
	if len(list) == 0 && judged {
		return []string{changesNothing}
	}
	return list
}

func changesOf(l checks.LoadOutcome) []string {
	var keys []checks.SecondVerdict
	places := map[checks.SecondVerdict][]string{}
	for _, v := range l.Second.Changed() {
		at := v.At
		v.At = ""
		if places[v] == nil {
			keys = append(keys, v)
		}
		places[v] = append(places[v], at)
	}
	var list []string
	for _, v := range keys {
		list = append(list, fmt.Sprintf("The second method changes a verdict: load case “%s”, %s, %s: %s instead of %s.", l.Name, strings.Join(places[v], ", "), minus(v.Limit), v.Second, v.First))
	}
	return list
}
