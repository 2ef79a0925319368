package material

import (
	"strings"
	"testing"
)

// A fault in the table is named.
func TestReadMaterialsFaults(t *testing.T) {
	for table, problem := range map[string]string{
		"":                        "no header",
		"id,T_C,k_W_mK\na,20,x\n": `column k_W_mK: "x" is not a number`,
		"id,formula,valid_range\na,k = 1 + 2 T,always\n": `valid range "always"`,
	} {
		if _, err := readMaterials(table); err == nil || !strings.Contains(err.Error(), problem) {
			t.Errorf("%q: error %v, want %q", table, err, problem)
		}
	}
}

// Rows of one material may come in any order of temperature.
func TestReadMaterialsSorts(t *testing.T) {
	list, err := readMaterials("id,T_C,k_W_mK\na,100,2\na,0,1\na,50,1.2\n")
	if err != nil || len(list) != 1 {
		t.Fatal(list, err)
	}
	if k := list[0].At(75 + Celsius0); k != 1.6 {
		t.Errorf("conductivity %g", k)
	}
}
