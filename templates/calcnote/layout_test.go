package calcnote

import (
	"fmt"
	"regexp"
	"strings"
	"testing"

	"stillair/checks"
	"stillair/checks/casefile"
)

// content are the lines of a page between its head and its foot.
func content(page string) []string {
	var lines []string
	for _, l := range strings.Split(page, "\n") {
		if strings.TrimSpace(l) != "" {
			lines = append(lines, strings.TrimSpace(l))
		}
	}
	return lines[2 : len(lines)-2]
}

var headingLine = regexp.MustCompile(`^\d{1,2}(\.\d{1,2})?\s{2,}[\p{Lu}“]`)

// TestPagesAreWellFilled looks for headings alone at the foot of a page and for
// a last page with a few lines.
func TestPagesAreWellFilled(t *testing.T) {
	for _, name := range starters() {
		for _, paper := range []string{"A4", "Letter"} {
			o := outcome(t, name)
			issue(o)
			p := pages(t, write(t, o, Options{Paper: paper}))
			for i, text := range p[1:] {
				lines := content(text)
				if last := lines[len(lines)-1]; headingLine.MatchString(last) {
					t.Errorf("%s, %s, page %d ends with the heading %q", name, paper, i+2, last)
				}
			}
			if n := len(content(p[len(p)-1])); n < 10 {
				t.Errorf("%s, %s: %d lines on the last page", name, paper, n)
			}
		}
	}
}

// noteText is the text of a note without its status mark.
func noteText(t *testing.T, o *checks.Outcome) []string {
	t.Helper()
	issue(o)
	var out []string
	for _, p := range pages(t, write(t, o, Options{})) {
		out = append(out, flat(p))
	}
	return out
}

func TestLimitsNobodyJudgedAreOnTheFirstPage(t *testing.T) {
	o := outcome(t, "plate")
	o.Unjudged = []string{"inside air: at most 70 °C"}
	p := noteText(t, o)
	const want = "Not judged in any load case: inside air: at most 70 °C."
	if !strings.Contains(p[0], want) || strings.Count(strings.Join(p, " "), want) < 2 {
		t.Error("the limit is not named on the first page and among the checks")
	}
}

// TestBurnWordsNeedABurnThreshold compares a note with a burn threshold with
// one that judges a project limit on a face only.
func TestBurnWordsNeedABurnThreshold(t *testing.T) {
	with, without := strings.Join(noteText(t, outcome(t, "steam-pipe")), " "), strings.Join(noteText(t, outcome(t, "sphere")), " ")
	for text, burn := range map[string]bool{"A verdict on a burn threshold is": true, "Burn thresholds hold for short contact of a small area": true, noBurnThreshold: false} {
		if strings.Contains(with, text) != burn || strings.Contains(without, text) == burn {
			t.Errorf("%q: with a burn threshold %v, without one %v", text, strings.Contains(with, text), strings.Contains(without, text))
		}
	}
}

func TestAPurposeThatJudgesNothing(t *testing.T) {
	if p := noteText(t, outcome(t, "steam-pipe")); !strings.Contains(p[0], "not judged") || strings.Contains(p[0], "no limit given") {
		t.Error("the load case of purpose loss is not shown as not judged")
	}
}

// TestChangedVerdictsAreTold gives the second method another verdict word.
func TestChangedVerdictsAreTold(t *testing.T) {
	o := outcome(t, "cylinder")
	v := &o.Loads[0].Second.Verdicts[0]
	v.First, v.Second = checks.Pass, checks.ConditionalFail
	want := fmt.Sprintf("The second method changes a verdict: load case “%s”, %s, %s: conditional fail instead of pass.", o.Loads[0].Name, v.At, v.Limit)
	if got := strings.Count(strings.Join(noteText(t, o), " "), flat(want)); got != 2 {
		t.Errorf("%q is printed %d times, not in conclusion and second method", want, got)
	}
}

func TestTheFolderOfTheCaseFileIsNotPrinted(t *testing.T) {
	for name, want := range map[string]string{"a/b/case 1.yaml": "case 1.yaml", `C:\jobs\panel.yaml`: "panel.yaml", "panel.yaml": "panel.yaml"} {
		if got := baseName(name); got != want {
			t.Errorf("baseName(%q) = %q", name, got)
		}
	}
}

func TestMinusSigns(t *testing.T) {
	for s, want := range map[string]string{
		"-15.0 °C": "−15.0 °C", "at least -5 °C": "at least −5 °C", "(-3 K)": "(−3 K)", "10 - 10 × 2": "10 − 10 × 2",
		"18 (1975) 1323-1329": "18 (1975) 1323-1329", "2026-11-30": "2026-11-30", "EN 563 - Guide": "EN 563 - Guide",
	} {
		if got := minus(s); got != want {
			t.Errorf("minus(%q) = %q, want %q", s, got, want)
		}
	}
	if got := signText(-0.04, 1); got != "0.0" {
		t.Errorf("a difference that rounds to zero has a sign: %q", got)
	}
}

// TestSumsAddUpAsPrinted adds the printed terms of sums whose own digits would
// not give the printed sum.
func TestSumsAddUpAsPrinted(t *testing.T) {
	for _, terms := range [][]float64{{9.77664, 22.56996}, {24.62094, 55.37906}, {119.30349, 200.81249, -252.0}, {0.000123449, 0.000044449}, {0, 0}} {
		src := sumLine([]string{"a", "b", "c"}, terms...)
		parts := strings.Split(src, " = ")
		sum, err := evaluate(parts[1])
		result, err2 := evaluate(strings.Split(parts[2], `\ `)[0])
		if err != nil || err2 != nil {
			t.Errorf("%s: %v %v", src, err, err2)
			continue
		}
		_, fraction, _ := strings.Cut(strings.Split(parts[2], `\ `)[0], ".")
		last := 1.0
		for range fraction {
			last /= 10
		}
		if d := sum - result; d > last || d < -last {
			t.Errorf("%s: the printed terms give %g", src, sum)
		}
	}
}

func TestSourcesOfTablesAreCitedByNumber(t *testing.T) {
	var r references
	if got := r.sourceMark("material table: A, 1999 ; B, 2000 (confidence high)"); got != "material table\u00A0[1] (confidence high)" {
		t.Error(got)
	}
	if r.list[0] != "A, 1999; B, 2000" {
		t.Errorf("cited as %q", r.list[0])
	}
	if got := siOf(casefile.Input{Typed: "wall", SI: "wall"}); got != "" {
		t.Errorf("a word has the SI value %q", got)
	}
}

func TestPowersInNotesAreFormulas(t *testing.T) {
	for s, formulas := range map[string]int{"0.54 Ra^(1/4) and 35 L/Gr^(1/4)": 2, "32^(1/2) as 32^2": 2, "no power": 0} {
		got := 0
		for _, r := range prose(s) {
			if r.Inline != nil {
				got++
			}
			if strings.Contains(r.Text, "^") {
				t.Errorf("%q: %q is left", s, r.Text)
			}
		}
		if got != formulas {
			t.Errorf("%q: %d formulas", s, got)
		}
	}
}

// TestBothLawsOfARuleAreListed looks for the two laws behind every rule in use.
func TestBothLawsOfARuleAreListed(t *testing.T) {
	for name, want := range map[string][]string{
		"vessel": {"churchill-chu-popiel-vertical-cylinder", "churchill-chu-1975-plate", "popiel-2008-vertical-cylinder"},
		"plate":  {"inclined-rule-up", "churchill-chu-1975-plate"},
	} {
		o := outcome(t, name)
		var films []checks.FilmRow
		for _, l := range o.Loads {
			films = append(films, l.Films...)
		}
		found := map[string]string{}
		for _, u := range used(films) {
			found[u.method.ID] = strings.Join(u.whys, "; ")
		}
		for _, id := range want {
			if _, ok := found[id]; !ok {
				t.Errorf("%s: %s is not listed", name, id)
			}
		}
		if name == "vessel" && strings.Contains(found["churchill-chu-1975-plate"], "cylinder is a plate") {
			t.Error("the plate law has the reason of the rule")
		}
	}
}
