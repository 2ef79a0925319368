package freeconv

import (
	"fmt"
	"sort"
	"strings"
)

// records is the catalogue, filled once by init; byID finds a record by name.
var (
	records []*Correlation
	byID    = map[string]*Correlation{}
)

// standing is the default of a kind with its reason, and the other published
// source that serves as second method.
type standing struct {
	method      *Correlation
	why         string
	alternative *Correlation
}

// standings is filled by init, so that rules may refer to it.
var standings = map[Kind]standing{}

func init() {
	records = []*Correlation{
		&churchillChuPlate, &churchillChuPlateLaminar, &churchillChuPlateFlux, &churchillChuPlateFluxLaminar,
		&raithbyHollandsVertical, &mcAdamsVertical, &lefevrePlate, &squireEckert, &vlietLiu,
		&largestUp, &lloydMoran, &mcAdamsUp, &goldsteinUp, &raithbyHollandsUp, &fujiiImuraUp,
		&radziemskaDown, &mcAdamsDown, &raithbyHollandsDown, &fujiiImuraDown, &fluxDown,
		&inclinedRuleUp, &inclinedRuleDown, &raithbyHollandsInclinedUp, &raithbyHollandsInclinedDown,
		&richDown, &fujiiImuraInclinedUp, &fujiiImuraInclinedDown,
		&churchillChuCylinder, &churchillChuCylinderLaminar, &morganCylinder, &kuehnGoldstein, &mcAdamsCylinder,
		&verticalCylinderRule, &otherVerticalCylinderRule, &popielCylinder, &lefevreEde,
		&churchillSphere, &yugeSphere, &yovanovichSphere, &yovanovichCube, &yovanovichAny,
	}
	for _, c := range records {
		byID[c.ID] = c
		if c.Substitute == nil {
			c.Substitute = substituter(c.Equation)
		}
	}
	standings = map[Kind]standing{
		VerticalPlate: {&churchillChuPlate,
			"one smooth equation from conduction to turbulence, so that no result jumps at the transition", &mcAdamsVertical},
		PlateUp: {&largestUp,
			"the largest of three published branches: no jump where they meet, and it reaches down to small plates", &raithbyHollandsUp},
		PlateDown: {&radziemskaDown,
			"the exponent 1/5 is that of a stable layer draining over its edge; the older 1/4 law runs high at large Ra", &raithbyHollandsDown},
		InclinedUp: {&inclinedRuleUp,
			"holds at any tilt and meets the vertical and the horizontal plate at its ends", &raithbyHollandsInclinedUp},
		InclinedDown: {&inclinedRuleDown,
			"holds at any tilt and meets the vertical and the horizontal plate at its ends", &raithbyHollandsInclinedDown},
		HorizontalCylinder: {&churchillChuCylinder,
			"one smooth equation from conduction to turbulence, so that no result jumps at the transition", &morganCylinder},
		VerticalCylinder: {&verticalCylinderRule,
			"a thick cylinder is a plate bent round; a slender one loses more, and the larger of both laws has no jump between them", &otherVerticalCylinderRule},
		Sphere: {&churchillSphere,
			"starts from the exact conduction limit 2 and covers all Ra below 1e11", &yugeSphere},
		AnyShape: {&yovanovichAny,
			"the square root of the area as length makes one equation serve bodies of many shapes", &yovanovichCube},
	}
}

// All lists every record, grouped by situation.
func All() []*Correlation { return append([]*Correlation(nil), records...) }

// Find looks a record up by its ID.
func Find(id string) (*Correlation, bool) {
	c, ok := byID[id]
	return c, ok
}

// Default is the record used for a kind when none is asked for, and why. For
// an unknown kind it is that of the vertical plate.
func Default(k Kind) (c *Correlation, why string) {
	s, ok := standings[k]
	if !ok {
		s = standings[VerticalPlate]
	}
	return s.method, s.why
}

// Alternative is another published source for the same kind, for a second
// opinion on the first result. For an unknown kind it is that of the vertical
// plate.
func Alternative(k Kind) *Correlation {
	s, ok := standings[k]
	if !ok {
		s = standings[VerticalPlate]
	}
	return s.alternative
}

// For lists the records published for a kind, the default first.
func For(k Kind) []*Correlation {
	var list []*Correlation
	if s, ok := standings[k]; ok {
		list = append(list, s.method)
	}
	for _, c := range records {
		if c.Fits(k) && (len(list) == 0 || c != list[0]) {
			list = append(list, c)
		}
	}
	return list
}

// Check reports every entry of a choice that cannot be followed: a kind that
// does not exist, a record that does not exist, or a record published for
// another kind. The entries are reported in alphabetical order of kind.
func Check(choice Choice) []error {
	var errs []error
	for k, id := range choice {
		if err := checkOne(k, id); err != nil {
			errs = append(errs, err)
		}
	}
	sort.Slice(errs, func(i, j int) bool { return errs[i].Error() < errs[j].Error() })
	return errs
}

func checkOne(k Kind, id string) error {
	if _, ok := standings[k]; !ok {
		return fmt.Errorf("%s: there is no such situation; there are: %s", k, kindList())
	}
	c, ok := byID[id]
	if !ok {
		return fmt.Errorf("%s: there is no method %q; for this situation there are: %s", k, id, idList(k))
	}
	if !c.Fits(k) {
		return fmt.Errorf("%s: the method %q is for another situation; for this one there are: %s", k, id, idList(k))
	}
	return nil
}

func kindList() string {
	var names []string
	for _, k := range Kinds() {
		names = append(names, string(k))
	}
	return strings.Join(names, "; ")
}

func idList(k Kind) string {
	var ids []string
	for _, c := range For(k) {
		ids = append(ids, c.ID)
	}
	return strings.Join(ids, ", ")
}

// pick is the record to use for a kind: the one asked for if it fits, else
// the default. asked tells which.
func pick(k Kind, choice Choice) (c *Correlation, asked bool) {
	if id, ok := choice[k]; ok {
		if c, ok := byID[id]; ok && c.Fits(k) {
			return c, true
		}
	}
	return standings[k].method, false
}
