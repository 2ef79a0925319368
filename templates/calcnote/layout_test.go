package calcnote

import (
	"fmt"
	"regexp"
	"strings"
	"testing"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/unit"
	"stillair/templates/starter"
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
	n := (note{o: o}).with(nil)
	want := fmt.Sprintf("The second method changes a verdict: load case “%s”, %s, %s: conditional fail instead of pass.", o.Loads[0].Name, v.At, v.Limit)
	text := strings.Join(noteText(t, o), " ")
	if !strings.Contains(text, flat(want)) {
		t.Errorf("the conclusion does not say %q", want)
	}
	row := fmt.Sprintf("%s %s %s", n.bare(unit.Temperature, v.LimitK, 1), n.barePM(v.ValueK, v.U), "pass conditional fail")
	if !strings.Contains(text, flat(row)) {
		t.Errorf("the second method does not list %q", row)
	}
}

// TestEveryLoadCaseShowsItsSecondMethod wants the correlations of all load
// cases, and the films out of range named.
func TestEveryLoadCaseShowsItsSecondMethod(t *testing.T) {
	for _, name := range starters() {
		o := outcome(t, name)
		if name == "cylinder" {
			last := o.Loads[len(o.Loads)-1].Second
			last.Films[0].InRange, last.Films[0].Range = false, "Ra is too high"
		}
		text := strings.Join(noteText(t, o), " ")
		outside := false
		for _, l := range o.Loads {
			if l.Second == nil {
				continue
			}
			for _, f := range l.Second.Films {
				if !strings.Contains(text, flat(f.Film.Method.Name)) {
					t.Errorf("%s, %s: %q is missing", name, l.Name, f.Film.Method.Name)
				}
				outside = outside || !f.InRange
			}
		}
		if strings.Contains(text, "the difference is no measure of the uncertainty") != outside {
			t.Errorf("%s: films of the second method out of range %v, but the text does not say so", name, outside)
		}
	}
}

func TestHeatsKeepTheirDigits(t *testing.T) {
	for heat, want := range map[string]string{"10 mW": "0.0100 W", "1 uW": "1.00·10⁻⁶ W", "1 MW": "1 000 000 W"} {
		text, _ := starter.Get("sphere")
		o := run(t, "sphere.yaml", regexp.MustCompile(`(?m)^heat: [^#\n]*`).ReplaceAll(text, []byte("heat: "+heat+" ")))
		n := (note{o: o}).with(nil)
		if got := strings.ReplaceAll(flat(n.watts(o.Loads[0].Case.Heat.SI, o.Loads[0].Case.Heat.SI)), "\u2009", " "); got != want {
			t.Errorf("%s is printed %q, want %q", heat, got, want)
		}
		all := strings.Join(noteText(t, o), " ")
		if regexp.MustCompile(`sheds: “as described” [0.]+ W`).MatchString(all) {
			t.Errorf("%s: the heat shed is printed as zero", heat)
		}
		if m := regexp.MustCompile(`\d[eE][+-]\d\d`).FindString(all); m != "" {
			t.Errorf("%s: %q is printed", heat, m)
		}
		if strings.Contains(all, "net of sun") {
			t.Errorf("%s: net of sun without sun", heat)
		}
	}
}

func TestCitationsAreCutWhole(t *testing.T) {
	long := strings.Repeat("word ", 16)
	for s, want := range map[string]string{
		"short (1990)": "short (1990)", "ISO 13732-1:2006 (" + long + "more; words) and": "ISO 13732-1:2006",
		long + "abcdefghijklmnop": strings.TrimSpace(long) + "…", "ISO 1; " + long + long: "ISO 1",
	} {
		if got := shortSource(s); got != want {
			t.Errorf("shortSource(%q) = %q, want %q", s, got, want)
		}
	}
}

// TestThresholdsOfLowConfidenceAreTold wants the warning on the first page and
// in the conclusion, and only where the data call for it.
func TestThresholdsOfLowConfidenceAreTold(t *testing.T) {
	for _, confidence := range []string{"low", "high"} {
		o := outcome(t, "plate")
		for i := range o.Loads {
			for j := range o.Loads[i].Verdicts {
				o.Loads[i].Verdicts[j].Confidence = confidence
			}
		}
		p, want := noteText(t, o), 0
		if confidence == "low" {
			want = 1
		}
		if first, rest := strings.Count(p[0], lowConfidence), strings.Count(strings.Join(p[1:], " "), lowConfidence); first != want || rest != want {
			t.Errorf("confidence %s: told %d times on the first page and %d after it, want %d", confidence, first, rest, want)
		}
	}
}

func TestReplacedCharactersAreHandedBack(t *testing.T) {
	o := outcome(t, "plate")
	list := []string{"old"}
	write(t, o, Options{Replaced: &list})
	if len(list) != 0 {
		t.Errorf("replaced %q", list)
	}
	o.Case.Title += " 日"
	write(t, o, Options{Replaced: &list})
	if len(list) != 1 || !strings.HasPrefix(list[0], "U+65E5") {
		t.Errorf("replaced %q, want U+65E5", list)
	}
}

// TestSymbolsAreThoseUsed wants Gr only where something printed has it.
func TestSymbolsAreThoseUsed(t *testing.T) {
	for _, name := range starters() {
		n := (note{o: outcome(t, name)}).with(nil)
		listed := map[string]bool{}
		for _, e := range n.symbolList() {
			if listed[e.symbol] {
				t.Errorf("%s: %s is listed twice", name, e.symbol)
			}
			listed[e.symbol] = true
		}
		if used := strings.Contains(n.written(), "Gr"); listed["Gr"] != used {
			t.Errorf("%s: Gr listed %v, used %v", name, listed["Gr"], used)
		}
		for _, s := range []string{`\Delta T`, `U_{+}, U_{-}`} {
			if !listed[s] {
				t.Errorf("%s: %s is not listed", name, s)
			}
		}
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
