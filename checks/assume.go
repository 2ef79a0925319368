package checks

import (
	"fmt"
	"slices"
	"strings"

	"stillair/checks/casefile"
	"stillair/checks/limit"
)

// assumptions lists what the model takes for granted, in the order a reviewer
// would ask. Values nobody typed are listed apart, as inputs.
func assumptions(cases []casefile.Case) []string {
	c := cases[0]
	list := []string{
		"Steady state; still air without wind, draught or fan; every face isothermal at its mean temperature, local hot spots are higher.",
		"Dry air by the published property equations named in the methods, expansion coefficient 1/T; grey diffuse surfaces that see only their surroundings, large and at one radiant temperature.",
	}
	list = append(list, bodyAssumptions(c)...)
	if c.Body.Kind == "box" {
		list = append(list, boxAssumptions(c)...)
	} else if c.Contents.Set {
		list = append(list, "The film between the contents and the wall is left out: the inside of the wall is at the temperature of the contents; a hot face is then hotter than in fact, a cold one colder.")
	}
	if text := coatings(c.Limits); text != "" {
		list = append(list, text)
	}
	if slices.ContainsFunc(c.Limits, func(l casefile.Limit) bool { return l.NoCondensation }) {
		list = append(list, "Condensation is judged on the outside of the faces against the air outside; inside a closed body it is not judged.")
	}
	if names := coveredFaces(cases); len(names) > 0 {
		list = append(list, fmt.Sprintf("Covered faces shed no heat: %s.", strings.Join(names, ", ")))
	}
	return list
}

func bodyAssumptions(c casefile.Case) []string {
	var list []string
	switch c.Body.Kind {
	case "plate":
		list = append(list, "The edges of the plate are left out.")
	case "pipe":
		list = append(list, "Long straight run: no ends, flanges, valves or supports; these are hotter than the insulated run and to be looked at apart.")
	case "vessel":
		list = append(list, "Supports, nozzles and manways are left out.")
		if c.Body.Heads == "dished" {
			list = append(list, "Dished heads are 2:1 semi-ellipsoidal; their film is that of a flat disc of the same diameter, their area that of the dish.")
		}
	}
	if len(c.Body.Layers) > 0 && c.Body.Kind != "pipe" && c.Body.Kind != "sphere" && c.Body.Kind != "plate" {
		list = append(list, "Where layers of two faces meet, the edge or ring between them is left out; plane layers use the mean of their inner and outer area.")
	}
	return list
}

func boxAssumptions(c casefile.Case) []string {
	return []string{
		fmt.Sprintf("The inside air is one mixed node; the equipment radiates to the walls as if it were at the inside air temperature, with the effective emissivity %s. This inside model rests on published films and on judgement; no measured sealed enclosure with full dimensions was available to validate it.", c.Inside.Emissivity.Typed),
		fmt.Sprintf("The upper zone is taken as the air outside plus %s times the mean rise of the inside air, and at the mean where the inside air is cooler than the air outside: an assumed factor without a published source.", c.Inside.UpperZone.Typed),
		"A limit of the inside air is judged on its mean; the upper zone is hotter and judged only where a limit names it.",
		"Heat does not spread along the walls from face to face.",
	}
}

func coveredFaces(cases []casefile.Case) []string {
	var names []string
	for _, c := range cases {
		for name, reason := range c.Body.Covered {
			text := fmt.Sprintf("%s (%s)", name, reason)
			if !slices.Contains(names, text) {
				names = append(names, text)
			}
		}
	}
	slices.Sort(names)
	return names
}

// coatings tells what a coated surface is taken for in a touch limit.
func coatings(limits []casefile.Limit) string {
	for _, l := range limits {
		if t, err := limit.Touch(l.Touch, l.Contact.SI); err == nil && t.Material == "coated metal" {
			return "Coated metal is taken as metal under 50 µm of lacquer; a thinner coating burns at a lower temperature, down to that of bare metal."
		}
	}
	return ""
}
