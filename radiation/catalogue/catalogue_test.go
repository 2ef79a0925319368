package catalogue_test

import (
	"slices"
	"testing"

	"stillair/radiation/catalogue"
)

func TestReadFaults(t *testing.T) {
	if _, err := catalogue.Read(""); err == nil {
		t.Error("a table without a header must be refused")
	}
	if _, err := catalogue.Read("a,b\n1\n"); err == nil {
		t.Error("a short line must be refused")
	}
	rows, err := catalogue.Read("a,b\n1,x\n,2\n")
	if err != nil || len(rows) != 2 {
		t.Fatal(rows, err)
	}
	if _, _, err := rows[0].Number("b"); err == nil || err.Error() != `table record 2, column b: "x" is not a number` {
		t.Errorf("error is %v", err)
	}
	if _, given, err := rows[1].Number("a"); given || err != nil {
		t.Error("an empty field is no number and no error")
	}
	if rows[0].Text("c") != "" {
		t.Error("a column that is not there is empty")
	}
}

func TestFind(t *testing.T) {
	entries := [][2]string{{"x1", "steel, rolled"}, {"x2", "steel"}, {"x3", "stone"}, {"stone", "slate, grey"}, {"x5", "wood, soft"}, {"x6", "wood, hard"},
		{"x7", "paint-coated metal cladding"}, {"x8", "oil paint, any colour"}, {"x9", "plain carbon steel"}}
	entry := func(i int) (string, string) { return entries[i][0], entries[i][1] }
	for words, want := range map[string]int{
		"X1": 0, "steel rolled": 0, "Steel": 1, "stone": 3, "SLATE": 3, "slate-gray": 3,
		"wood": -1, "wood hard": 5, "hard wood": 5, "st": -1, "rolled": 0, "roll": -1, "rolled stone": -1, "": -1, " - ": -1,
		"paint": -1, "metal cladding": 6, "cladding, paint coated": 6, "any color paint": 7, "carbon steel": 8, "steel carbon sheet": -1,
	} {
		i, ok := catalogue.Find(words, len(entries), entry)
		if ok != (want >= 0) || ok && i != want {
			t.Errorf("%q finds %d %v, want %d", words, i, ok, want)
		}
	}
}

func TestHolding(t *testing.T) {
	names := []string{"oil paint, any colour", "paint-coated metal cladding", "paints, 8 colours"}
	if got := catalogue.Holding("Paint", names); !slices.Equal(got, names[:2]) {
		t.Errorf("paint: %q", got)
	}
	if got := catalogue.Holding("", names); got != nil {
		t.Errorf("no word: %q", got)
	}
}

func TestVersion(t *testing.T) {
	// FIPS 180-4 example: SHA-256 of "abc" begins ba7816bf 8f01cfea.
	if v := catalogue.Version("abc"); v != "ba7816bf8f01" {
		t.Errorf("version %q", v)
	}
}

func TestLowerConfidence(t *testing.T) {
	for _, c := range [][3]string{{"high", "low", "low"}, {"medium", "high", "medium"}, {"low", "low", "low"}, {"high", "", ""}} {
		if got := catalogue.LowerConfidence(c[0], c[1]); got != c[2] {
			t.Errorf("of %q and %q: %q", c[0], c[1], got)
		}
	}
}
