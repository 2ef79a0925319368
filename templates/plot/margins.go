package plot

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks"
	"stillair/checks/unit"
)

// mostRows is how many checks are drawn; the rest is summed up in words.
const mostRows = 14

// check is one limit judged in one load case.
type check struct {
	checks.Judged
	load string
}

// drawable tells whether all its numbers are numbers of this world.
func (c check) drawable() bool {
	const most = 1e5 // K
	return finite(c.LimitK, c.ValueK, c.MarginK, c.Uncertainty) && c.Uncertainty >= 0 &&
		math.Abs(c.LimitK) < most && math.Abs(c.ValueK) < most && c.Uncertainty < most
}

// guard is the guard band: one uncertainty on the permitted side of the limit.
func (c check) guard() (from, to float64) {
	if c.Lower {
		return c.LimitK, c.LimitK + c.Uncertainty
	}
	return c.LimitK - c.Uncertainty, c.LimitK
}

// graver orders checks with the worst first.
func graver(a, b check) int {
	return cmp.Or(cmp.Compare(b.Verdict.Rank(), a.Verdict.Rank()), cmp.Compare(a.MarginK, b.MarginK))
}

// group is what is drawn under one limit, the worst first.
type group struct {
	limit string
	rows  []check
}

// selection is what a chart shows and what it only sums up.
type selection struct {
	groups []group
	rest   string
}

// slots is the number of lines of the chart.
func (s selection) slots() int {
	n := len(s.groups)
	for _, g := range s.groups {
		n += len(g.rows)
	}
	if s.rest != "" {
		n++
	}
	return n
}

// candidates are all checks in the order in which they deserve a line: those
// that govern their limit, those that are not a pass, the worst of every limit
// in every load case, and the others, which get none.
func candidates(o *checks.Outcome) (ranked, others []check) {
	var governing, grave, passes []check
	for _, l := range o.Loads {
		for _, v := range l.Verdicts {
			c := check{Judged: v, load: plain(l.Name)}
			switch {
			case !c.drawable():
				others = append(others, c)
			case v.Governing:
				governing = append(governing, c)
			case v.Verdict != checks.Pass:
				grave = append(grave, c)
			default:
				passes = append(passes, c)
			}
		}
	}
	for _, list := range [][]check{governing, grave, passes} {
		slices.SortStableFunc(list, graver)
	}
	ranked = append(governing, grave...)
	worst, rest := worstOfEach(passes, ranked)
	return append(ranked, worst...), append(others, rest...)
}

// worstOfEach keeps the first of sorted checks for every limit and load case
// that is not among those taken already.
func worstOfEach(list, already []check) (worst, rest []check) {
	taken := map[string]bool{}
	key := func(c check) string { return c.load + "|" + c.Limit + "|" + c.Source }
	for _, c := range already {
		taken[key(c)] = true
	}
	for _, c := range list {
		if taken[key(c)] {
			rest = append(rest, c)
			continue
		}
		taken[key(c)] = true
		worst = append(worst, c)
	}
	return worst, rest
}

// choose picks the checks for a chart of a number of lines.
func choose(o *checks.Outcome, lines int) selection {
	ranked, others := candidates(o)
	var s selection
	for i, c := range ranked {
		next := s.with(c)
		more := i+1 < len(ranked) || len(others) > 0 || withoutResult(o) > 0
		if i >= mostRows || next.slots() > lines || more && next.slots() >= lines {
			others = append(others, ranked[i:]...)
			break
		}
		s = next
	}
	s.rest = summary(others, withoutResult(o))
	return s
}

// with adds a check under its limit.
func (s selection) with(c check) selection {
	groups := slices.Clone(s.groups)
	for i, g := range groups {
		if g.rows[0].Limit == c.Limit && g.rows[0].Source == c.Source {
			rows := append(slices.Clone(g.rows), c)
			slices.SortStableFunc(rows, graver)
			groups[i].rows = rows
			return selection{groups: groups}
		}
	}
	return selection{groups: append(groups, group{limit: plain(c.Limit), rows: []check{c}})}
}

func withoutResult(o *checks.Outcome) int {
	n := 0
	for _, l := range o.Loads {
		if l.Status != checks.Converged {
			n++
		}
	}
	return n
}

// summary tells how the checks came out that are not drawn.
func summary(rest []check, noResult int) string {
	var parts []string
	if text := restText(rest); text != "" {
		parts = append(parts, text)
	}
	if noResult > 0 {
		parts = append(parts, count(noResult, "load case")+" without a valid result")
	}
	return strings.Join(parts, "; ")
}

func restText(rest []check) string {
	number := map[checks.Verdict]int{}
	for _, c := range rest {
		number[c.Verdict]++
	}
	head := count(len(rest), "further check")
	switch {
	case len(rest) == 0:
		return ""
	case len(rest) == 1:
		return head + ": " + string(rest[0].Verdict)
	case len(number) == 1:
		return head + ", all " + string(rest[0].Verdict)
	}
	var list []string
	for _, v := range []checks.Verdict{checks.NoResult, checks.Fail, checks.ConditionalFail, checks.ConditionalPass, checks.Pass, checks.None} {
		if number[v] > 0 {
			list = append(list, fmt.Sprintf("%d %s", number[v], v))
		}
	}
	return head + ": " + strings.Join(list, ", ")
}

func count(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// system is how the first load case wants its units.
func system(o *checks.Outcome) unit.System {
	if len(o.Loads) == 0 {
		return unit.SI
	}
	return unit.SystemOf(o.Loads[0].Case.Units)
}

// heading is the limit in words, with its value unless the words tell it or
// it differs between the checks under it.
func (g group) heading(sys unit.System) string {
	for _, r := range g.rows {
		if math.Abs(r.LimitK-g.rows[0].LimitK) > 0.05 {
			return g.limit
		}
	}
	told := strings.ReplaceAll(g.limit, unit.NoBreak, " ")
	for decimals := 0; decimals <= 1; decimals++ {
		if strings.Contains(told, strings.ReplaceAll(sys.Show(unit.Temperature, g.rows[0].LimitK, decimals), unit.NoBreak, " ")) {
			return g.limit
		}
	}
	return sys.Show(unit.Temperature, g.rows[0].LimitK, 1) + ": " + g.limit
}

// label names the place, and the load case when there are several.
func (c check) label(loads int) string {
	if loads < 2 {
		return plain(c.At)
	}
	return plain(c.At) + ", " + c.load
}

// title is the chart in words.
func (s selection) title(sys unit.System, loads int) string {
	var b strings.Builder
	b.WriteString("Checks at a glance.")
	for _, g := range s.groups {
		for _, c := range g.rows {
			fmt.Fprintf(&b, " %s: %s, calculated %s, %s.", c.label(loads), g.limit, sys.ShowPM(unit.Temperature, c.ValueK, c.Uncertainty), c.Verdict)
		}
	}
	if s.rest != "" {
		b.WriteString(" " + s.rest + ".")
	}
	return b.String()
}
