package radiation

import (
	_ "embed" // the finish table
	"fmt"
	"slices"
	"strings"
	"sync"

	"stillair/radiation/catalogue"
)

//go:embed finishes.csv
var finishTable string

// Finish is one surface finish of the catalogue with its infrared emissivity
// and, where published, its solar absorptance. All values are fractions of
// those of a black body, 0 to 1.
type Finish struct {
	ID    string
	Group string // "aluminium", "paint", "cladding" ...
	Name  string

	// Low, Typical and High bound the emissivity of the finish in practice.
	Low, Typical, High float64

	Band  string // spectral band of the emissivity: "total normal", "8-14 µm only" ...
	TempC string // surface temperatures of the data, °C

	// HasAbsorb says that a solar absorptance is published. Where only its
	// ends are, Absorb is the upper one, which makes the hotter face; where
	// only one value is, all three are that value.
	HasAbsorb                     bool
	AbsorbLow, Absorb, AbsorbHigh float64

	Source     string
	VerifiedBy string // "print", "memory", "print + memory"
	Confidence string // "high", "medium", "low"
	Notes      string
}

// TotalEmissivity reports whether the emissivity belongs to the whole thermal
// spectrum, as a heat balance needs it. Values for the band of an infrared
// camera can be far from it: anodised aluminium reads 0.97 in 8 µm to 14 µm
// and 0.55 in total.
func (f Finish) TotalEmissivity() bool { return strings.HasPrefix(f.Band, "total") }

// Finishes lists the catalogue in the order of its table.
func Finishes() []Finish { return slices.Clone(finishes()) }

// FindFinish looks a finish up by its id, its name or words of its name
// that no other finish has all of. Case, punctuation and extra
// spaces make no difference.
func FindFinish(name string) (Finish, bool) {
	all := finishes()
	i, ok := catalogue.Find(name, len(all), func(i int) (string, string) { return all[i].ID, all[i].Name })
	if !ok {
		return Finish{}, false
	}
	return all[i], true
}

// DataVersion identifies the finish table built into the program.
func DataVersion() string { return catalogue.Version(finishTable) }

// finishes is the parsed table. The table is part of the program, so one that
// does not parse is a fault of the program, not of any input.
var finishes = sync.OnceValue(func() []Finish {
	list, err := readFinishes(finishTable)
	if err != nil {
		panic(err)
	}
	return list
})

func readFinishes(table string) ([]Finish, error) {
	rows, err := catalogue.Read(table)
	if err != nil {
		return nil, err
	}
	list := make([]Finish, 0, len(rows))
	for _, r := range rows {
		f, err := readFinish(r)
		if err != nil {
			return nil, err
		}
		list = append(list, f)
	}
	return list, nil
}

func readFinish(r catalogue.Row) (Finish, error) {
	f := Finish{
		ID: r.Text("id"), Group: r.Text("group"), Name: r.Text("name"),
		Band: r.Text("band"), TempC: r.Text("temp_C"),
		Source: r.Text("source"), VerifiedBy: r.Text("verified_by"),
		Confidence: r.Text("confidence"), Notes: r.Text("notes"),
	}
	columns := []struct {
		name string
		to   *float64
	}{{"eps_low", &f.Low}, {"eps_typ", &f.Typical}, {"eps_high", &f.High}}
	for _, c := range columns {
		v, given, err := r.Number(c.name)
		if err != nil {
			return Finish{}, err
		}
		if !given {
			return Finish{}, fmt.Errorf("finish %s: %s is missing", f.ID, c.name)
		}
		*c.to = v
	}
	return f, f.readAbsorptance(r)
}

// readAbsorptance fills the solar absorptance from the values that the table has.
func (f *Finish) readAbsorptance(r catalogue.Row) error {
	low, hasLow, err := r.Number("alpha_solar_low")
	if err != nil {
		return err
	}
	typical, hasTypical, err := r.Number("alpha_solar_typ")
	if err != nil {
		return err
	}
	high, hasHigh, err := r.Number("alpha_solar_high")
	if err != nil {
		return err
	}
	switch {
	case hasTypical && hasLow && hasHigh:
	case hasTypical:
		low, high = typical, typical
	case hasLow && hasHigh:
		typical = high
	default:
		return nil
	}
	f.HasAbsorb, f.AbsorbLow, f.Absorb, f.AbsorbHigh = true, low, typical, high
	return nil
}
