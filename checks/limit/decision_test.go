package limit_test

import (
	"fmt"
	"math"
	"regexp"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"stillair/checks/limit"
)

// The four zones of ILAC-G8:09/2019, 4.2.3, for a limit of 60 and U = 4.
func TestFourWays(t *testing.T) {
	for _, c := range []struct {
		value float64
		lower bool
		want  string
	}{
		{50, false, "pass"}, {56, false, "pass"}, {56.1, false, "conditional pass"}, {60, false, "conditional pass"},
		{60.1, false, "conditional fail"}, {64, false, "conditional fail"}, {64.1, false, "fail"},
		{70, true, "pass"}, {64, true, "pass"}, {63.9, true, "conditional pass"}, {60, true, "conditional pass"},
		{59.9, true, "conditional fail"}, {56, true, "conditional fail"}, {55.9, true, "fail"},
	} {
		if word, _ := limit.Judge(c.value, 60, 4, c.lower); word != c.want {
			t.Errorf("%g, lower %v: %s, want %s", c.value, c.lower, word, c.want)
		}
	}
}

// Conformance at a distance w below the limit, in standard uncertainties u:
// 1 - risk of the normal law. ILAC-G8:09/2019 prints 50 % for w = 0 and less
// than 2.5 % risk for w = U = 2 u; the rest are tabulated normal quantiles.
func TestConformance(t *testing.T) {
	for _, c := range []struct{ w, percent, within float64 }{
		{0, 50, 1e-9}, {1, 100 - 15.9, 0.05}, {1.282, 90, 0.01}, {1.645, 95, 0.01},
		{2, 97.7, 0.05}, {2.326, 99, 0.005}, {3, 100 - 0.13, 0.006},
	} {
		const u = 1.7
		if _, p := limit.Judge(55-c.w*u, 55, 2*u, false); math.Abs(100*p-c.percent) > c.within {
			t.Errorf("%g u below: %g %%, want %g %%", c.w, 100*p, c.percent)
		}
		if _, p := limit.Judge(55-c.w*u, 55, 2*u, true); math.Abs(100*p-(100-c.percent)) > c.within {
			t.Errorf("%g u below a lowest temperature: %g %%, want %g %%", c.w, 100*p, 100-c.percent)
		}
	}
	// Less than one in a million at 6 u (the "6 sigma" row, from memory).
	if _, p := limit.Judge(0, 6, 2, false); !(1-p < 1e-6) {
		t.Errorf("6 u: risk %g", 1-p)
	}
}

func TestJudgeWithoutUncertainty(t *testing.T) {
	for value, want := range map[float64]string{54: "pass", 55: "pass", 55.001: "fail"} {
		word, p := limit.Judge(value, 55, 0, false)
		if word != want || (p == 1) != (want == "pass") || p != 0 && p != 1 {
			t.Errorf("%g: %s with %g, want %s", value, word, p, want)
		}
	}
}

func TestJudgeNeverNaN(t *testing.T) {
	odd := []float64{0, 1, -1, math.NaN(), math.Inf(1), math.Inf(-1)}
	words := []string{limit.Pass, limit.ConditionalPass, limit.ConditionalFail, limit.Fail}
	for _, value := range odd {
		for _, most := range odd {
			for _, U := range odd {
				word, p := limit.Judge(value, most, U, false)
				if !(p >= 0 && p <= 1) || !slices.Contains(words, word) {
					t.Errorf("Judge(%g, %g, %g) is %s, %g", value, most, U, word, p)
				}
				if finite := !math.IsNaN(value-value) && !math.IsNaN(most-most) && !math.IsNaN(U); !finite && word != limit.Fail {
					t.Errorf("Judge(%g, %g, %g) is %s", value, most, U, word)
				}
			}
		}
	}
}

// The word and the probability tell the same story, and a hotter value is never
// judged better.
func TestJudgeProperties(t *testing.T) {
	order := []string{limit.Fail, limit.ConditionalFail, limit.ConditionalPass, limit.Pass}
	number := rapid.Float64Range(-50, 300)
	rapid.Check(t, func(t *rapid.T) {
		most, U := number.Draw(t, "limit"), rapid.Float64Range(0.01, 50).Draw(t, "U")
		a, b := number.Draw(t, "a"), number.Draw(t, "b")
		cool, pCool := limit.Judge(min(a, b), most, U, false)
		hot, pHot := limit.Judge(max(a, b), most, U, false)
		if slices.Index(order, hot) > slices.Index(order, cool) || pHot > pCool {
			t.Errorf("hotter is better: %s %g, %s %g", cool, pCool, hot, pHot)
		}
		if passes := strings.HasSuffix(hot, "pass"); passes != (pHot >= 0.5) && math.Abs(pHot-0.5) > 1e-9 {
			t.Errorf("%s with a conformance of %g", hot, pHot)
		}
		if hot == limit.Pass && pHot < 0.977 { // 97.7 % at w = U = 2 u
			t.Errorf("pass with a conformance of %g", pHot)
		}
	})
}

func ExampleJudge() {
	word, conformance := limit.Judge(52.0, 55.0, 4.2, false)
	fmt.Printf("%s, %.0f %%\n", word, 100*conformance)
	// Output: conditional pass, 92 %
}

func TestDecisionRule(t *testing.T) {
	for _, part := range []string{"ILAC-G8:09/2019, 4.2.3", "guard band", limit.ConditionalPass, limit.ConditionalFail, "coverage factor 2"} {
		if !strings.Contains(limit.DecisionRule, part) {
			t.Errorf("the rule does not mention %q", part)
		}
	}
}

// The cautions name what a touch verdict must say, in plain sentences, and
// promise nothing.
func TestCautions(t *testing.T) {
	all := limit.Cautions()
	if len(all) < 12 || len(all) > 16 {
		t.Errorf("%d cautions", len(all))
	}
	for _, c := range append(all, limit.CautionHead) {
		if !strings.HasSuffix(c, ".") || len(c) > 260 {
			t.Errorf("not a short sentence: %q", c)
		}
		if regexp.MustCompile(`(?i)\b(safe|certified|compliant|guarantee)`).MatchString(c) {
			t.Errorf("a promise: %q", c)
		}
	}
	text := strings.Join(all, " ")
	for _, subject := range []string{"0.5 s", "10 %", "43 °C", "Children", "trapped", "Hot spots", "Emissivity drifts", "Sun", "Measure before", "insulation", "explosive", "gloves"} {
		if !strings.Contains(text, subject) {
			t.Errorf("no caution about %q", subject)
		}
	}
	if n := strings.Count(limit.CautionHead, ". ") + 1; n != 2 {
		t.Errorf("the head has %d sentences", n)
	}
	all[0] = ""
	if limit.Cautions()[0] == "" {
		t.Error("a caller can change the cautions")
	}
}
