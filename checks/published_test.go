package checks

import (
	"encoding/csv"
	"fmt"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"stillair/checks/casefile"
)

// readCase reads a case file from its text; a finding fails the test.
func readCase(t testing.TB, text string) *casefile.File {
	t.Helper()
	f, findings := casefile.Read("test.yaml", []byte(text), casefile.Defaults{})
	for _, x := range findings {
		if x.Severity == casefile.Error {
			t.Fatalf("%d:%d %s %s (found %q, expected %s)\n%s", x.Line, x.Column, x.Code, x.Message, x.Found, x.Expected, text)
		}
	}
	if f == nil {
		t.Fatal("no file and no error")
	}
	return f
}

func run(t testing.TB, text string) *Outcome {
	t.Helper()
	return Run(readCase(t, text), Program{Name: "stillair", Version: "test"})
}

// table reads a CSV file of testdata as maps by column name.
func table(t testing.TB, name string) []map[string]string {
	t.Helper()
	f, err := os.Open("testdata/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var out []map[string]string
	for _, r := range rows[1:] {
		m := map[string]string{}
		for i, h := range rows[0] {
			m[h] = r[i]
		}
		out = append(out, m)
	}
	return out
}

func number(t testing.TB, s string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return v
}

// quantity picks what a row was published for.
func quantity(t testing.TB, l LoadOutcome, what, at string) float64 {
	t.Helper()
	switch what {
	case "rise":
		for _, x := range l.Temps {
			if x.At == at {
				return x.K - l.Case.Surroundings.Air.SI
			}
		}
	case "h", "Nu":
		for _, f := range l.Films {
			if f.At == at && f.Side == outside {
				return map[string]float64{"h": f.H, "Nu": f.Nu}[what]
			}
		}
	case "convection", "radiation", "heat":
		sum := 0.0
		for _, h := range l.Heat {
			if h.Final && (h.By == what || what == "heat") && (at == "both" || h.From == at) {
				sum += h.W
			}
		}
		return sum
	}
	t.Fatalf("no %s at %s", what, at)
	return 0
}

// Published examples run through the whole road with our own air: the case
// file is read, the balance solved, the answer compared with the book.
func TestPublishedExamplesEndToEnd(t *testing.T) {
	rows := table(t, "end_to_end.csv")
	if len(rows) < 27 {
		t.Errorf("only %d published examples", len(rows))
	}
	for _, r := range rows {
		t.Run(r["id"]+" "+r["source"], func(t *testing.T) {
			text := fmt.Sprintf("title: %s\nsurroundings: %s\nbody:\n  %s\n%s\n", r["what"], r["surroundings"], r["body"], r["drive"])
			if m := r["methods"]; m != "" {
				i := strings.LastIndex(m, ": ")
				text += fmt.Sprintf("methods: {%q: %s}\n", m[:i], m[i+2:])
			}
			o := run(t, text)
			if o.Loads[0].Status != Converged {
				t.Fatal(o.Loads[0].Message)
			}
			got, want := quantity(t, o.Loads[0], r["quantity"], r["at"]), number(t, r["published"])
			if dev := got/want - 1; math.Abs(dev) > number(t, r["tolerance_rel"]) {
				t.Errorf("%s at %s = %.5g %s, published %.5g (%s): %+.1f %%", r["quantity"], r["at"], got, r["unit"], want, r["provenance"], 100*dev)
			}
		})
	}
}
