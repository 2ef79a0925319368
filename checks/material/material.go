// Package material holds the thermal conductivity of wall, structural and
// insulation materials. Temperatures are in kelvin.
//
// Out of scope: the shape of the layer that conducts, moisture, ageing,
// contact resistance.
package material

import (
	_ "embed" // the material table
	"fmt"
	"slices"
	"sync"

	"stillair/radiation/catalogue"
)

//go:embed materials.csv
var materialTable string

// Celsius0 is 0 °C in kelvin.
const Celsius0 = 273.15

// LaboratorySpread is the relative standard deviation of the conductivity that
// different laboratories measured on the same insulation: 8.0 % for calcium
// silicate, 7.4 % for fibrous alumina-silica, guarded hot plate, 297 K to 773 K
// (ASTM C16.30 / NBS round robin). Twice this value, 16 %, is the least
// expanded uncertainty (coverage factor 2) to claim for catalogue insulation.
const LaboratorySpread = 0.080

// SinglePointSpan is how far from its temperature, in kelvin, a conductivity
// published at one temperature only is taken as in range. It is a convention of
// this program: the stone-wool pipe section of the table (EN 14303 data sheet)
// changes by 12 % from 10 °C to 50 °C, so 50 K stays near the 16 % that
// LaboratorySpread asks for.
const SinglePointSpan = 50

// Point is a conductivity K in W/(m·K) at a temperature T in kelvin.
type Point struct{ T, K float64 }

// Material is one entry of the catalogue.
type Material struct {
	ID     string
	Class  string // "structural" or "insulation"
	Name   string
	Points []Point // sorted by temperature; read only

	Rho float64 // density, kg/m³; 0 when the table has none
	C   float64 // specific heat, J/(kg·K), at the lowest temperature that has one; 0 when none has

	Formula    string // of the conductivity, when the source gives one
	ValidRange string // as the source states it, in words

	// Where the points of one material differ, Source and VerifiedBy list all
	// kinds and Confidence is the lowest.
	Source, VerifiedBy, Confidence, Notes string
}

// All lists the catalogue in the order of its table.
func All() []Material { return slices.Clone(materials()) }

// Find looks a material up by its id, its name or words of its name that
// no other material has all of. Case, punctuation and extra spaces
// make no difference. "steel" alone fits several and is not found.
func Find(name string) (Material, bool) {
	all := materials()
	i, ok := catalogue.Find(name, len(all), func(i int) (string, string) { return all[i].ID, all[i].Name })
	if !ok {
		return Material{}, false
	}
	return all[i], true
}

// DataVersion identifies the material table built into the program.
func DataVersion() string { return catalogue.Version(materialTable) }

// At is the conductivity in W/(m·K) at T: linear between the points, the value
// of the coldest point below them. Above them a rising table is carried on with
// its last slope, because holding its last value would make insulation better
// than it is; a falling one is held. InRange tells. A material without points
// has 0.
func (m Material) At(T float64) float64 {
	p := m.Points
	if len(p) == 0 {
		return 0
	}
	if !(T > p[0].T) {
		return p[0].K
	}
	for i := 1; i < len(p); i++ {
		if T <= p[i].T {
			share := (T - p[i-1].T) / (p[i].T - p[i-1].T)
			return p[i-1].K + share*(p[i].K-p[i-1].K)
		}
	}
	return p[len(p)-1].K + max(m.lastSlope(), 0)*max(min(T, hottest)-p[len(p)-1].T, 0)
}

// hottest is where a table stops being carried on, K: no layer is that hot.
const hottest = 2500.0

// lastSlope is dk/dT between the two hottest points, W/(m·K²); 0 for one point.
func (m Material) lastSlope() float64 {
	p := m.Points
	if len(p) < 2 {
		return 0
	}
	a, b := p[len(p)-2], p[len(p)-1]
	return (b.K - a.K) / (b.T - a.T)
}

// Mean is the mean conductivity in W/(m·K) between T1 and T2, in either order,
//
//	1/(T2 - T1) ∫ k dT,
//
// which makes the flux through a layer exact: q = Mean (T1 - T2)/s. It adds up
// the trapezia between the points as weighted means, so that no difference of
// large integrals costs digits when T1 and T2 are close. For T1 = T2 it is At.
func (m Material) Mean(T1, T2 float64) float64 {
	low, high := min(T1, T2), max(T1, T2)
	if !(high-low > 0 && high-low <= largest) {
		return m.At(low)
	}
	from, k := low, m.At(low)
	width, sum := 0.0, 0.0
	step := func(T float64) {
		next := m.At(T)
		sum += (T - from) * (k + next) / 2
		width += T - from
		from, k = T, next
	}
	for _, p := range m.Points {
		if p.T > low && p.T < high {
			step(p.T)
		}
	}
	step(high)
	return sum / width
}

// largest difference in kelvin that Mean takes; beyond it the integral is no
// longer a finite number.
const largest = 1e100

// InRange reports whether the conductivity is published for both temperatures:
// within the points, or within SinglePointSpan of a single one.
func (m Material) InRange(T1, T2 float64) bool {
	if len(m.Points) == 0 {
		return false
	}
	low, high := m.Points[0].T, m.Points[len(m.Points)-1].T
	if len(m.Points) == 1 {
		low, high = low-SinglePointSpan, high+SinglePointSpan
	}
	return min(T1, T2) >= low && max(T1, T2) <= high
}

// materials is the parsed table. The table is part of the program, so one that
// does not parse is a fault of the program, not of any input.
var materials = sync.OnceValue(func() []Material {
	list, err := readMaterials(materialTable)
	if err != nil {
		panic(err)
	}
	return list
})

// readMaterials gathers the rows of each id into one material.
func readMaterials(table string) ([]Material, error) {
	rows, err := catalogue.Read(table)
	if err != nil {
		return nil, err
	}
	var list []Material
	for _, r := range rows {
		m, err := readRow(r)
		if err != nil {
			return nil, err
		}
		if last := len(list) - 1; last >= 0 && list[last].ID == m.ID {
			list[last].add(m)
			continue
		}
		list = append(list, m)
	}
	for _, m := range list {
		slices.SortFunc(m.Points, func(a, b Point) int {
			if a.T < b.T {
				return -1
			}
			return 1
		})
	}
	return list, nil
}

// readRow is the material as one row alone describes it.
func readRow(r catalogue.Row) (Material, error) {
	m := Material{
		ID: r.Text("id"), Class: r.Text("class"), Name: r.Text("name"),
		Formula: r.Text("formula"), ValidRange: r.Text("valid_range"),
		Source: r.Text("source"), VerifiedBy: r.Text("verified_by"),
		Confidence: r.Text("confidence"), Notes: r.Text("notes"),
	}
	numbers := make(map[string]float64)
	for _, column := range []string{"T_C", "k_W_mK", "rho_kg_m3", "c_J_kgK", "a_W_mK", "b_W_mK2"} {
		v, _, err := r.Number(column)
		if err != nil {
			return Material{}, err
		}
		numbers[column] = v
	}
	m.Rho, m.C = numbers["rho_kg_m3"], numbers["c_J_kgK"]
	if m.Formula == "" {
		m.Points = []Point{{T: numbers["T_C"] + Celsius0, K: numbers["k_W_mK"]}}
		return m, nil
	}
	var err error
	m.Points, err = line(numbers["a_W_mK"], numbers["b_W_mK2"], m.ValidRange)
	return m, err
}

// line is k = a + b t, t in °C, at both ends of its valid range: two points
// hold a straight line exactly.
func line(a, b float64, validRange string) ([]Point, error) {
	var low, high float64
	if _, err := fmt.Sscanf(validRange, "%f-%f °C", &low, &high); err != nil {
		return nil, fmt.Errorf("valid range %q: %w", validRange, err)
	}
	return []Point{{low + Celsius0, a + b*low}, {high + Celsius0, a + b*high}}, nil
}

// add joins another row of the same material.
func (m *Material) add(row Material) {
	m.Points = append(m.Points, row.Points...)
	if m.C == 0 {
		m.C = row.C
	}
	m.Source = join(m.Source, row.Source)
	m.VerifiedBy = join(m.VerifiedBy, row.VerifiedBy)
	m.Notes = join(m.Notes, row.Notes)
	m.Confidence = catalogue.LowerConfidence(m.Confidence, row.Confidence)
}

// join appends a text to a list in words unless the list ends with it.
func join(list, text string) string {
	switch {
	case list == "" || text == list:
		return text
	case text == "" || len(list) > len(text) && list[len(list)-len(text):] == text:
		return list
	}
	return list + " ; " + text
}
