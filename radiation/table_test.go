package radiation

import (
	"strings"
	"testing"
)

// A fault in the table is named with its place.
func TestReadFinishesFaults(t *testing.T) {
	const header = "id,eps_low,eps_typ,eps_high,alpha_solar_low,alpha_solar_typ,alpha_solar_high\n"
	for table, problem := range map[string]string{
		"":                                "no header",
		header + "a,0.1,,0.3,,,\n":        "finish a: eps_typ is missing",
		header + "a,0.1,x,0.3,,,\n":       `column eps_typ: "x" is not a number`,
		header + "a,0.1,0.2,0.3,x,,\n":    "column alpha_solar_low",
		header + "a,0.1,0.2,0.3,,x,\n":    "column alpha_solar_typ",
		header + "a,0.1,0.2,0.3,0.1,,x\n": "column alpha_solar_high",
	} {
		if _, err := readFinishes(table); err == nil || !strings.Contains(err.Error(), problem) {
			t.Errorf("%q: error %v, want %q", table, err, problem)
		}
	}
}
