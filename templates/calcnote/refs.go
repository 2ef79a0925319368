package calcnote

import (
	"fmt"
	"strings"
)

// references numbers sources in the order they are first cited.
type references struct{ list []string }

// number is the number of a source, new when it was not cited before.
func (r *references) number(source string) int {
	source = tidySource(source)
	for i, s := range r.list {
		if s == source {
			return i + 1
		}
	}
	r.list = append(r.list, source)
	return len(r.list)
}

// marks is "[1] [4]" for sources; empty sources have no mark.
func (r *references) marks(sources ...string) string {
	var out []string
	for _, s := range sources {
		if strings.TrimSpace(s) != "" {
			out = append(out, fmt.Sprintf("[%d]", r.number(s)))
		}
	}
	return strings.Join(out, "\u00A0")
}

// sourceMark shortens a source to its first words and the number of the
// citation that follows them: "material table [3] (confidence high)".
func (r *references) sourceMark(source string) string {
	for _, table := range []string{"material table", "finish table"} {
		rest, found := strings.CutPrefix(source, table+": ")
		if !found {
			continue
		}
		confidence := ""
		if i := strings.LastIndex(rest, " (confidence "); i > 0 {
			rest, confidence = rest[:i], rest[i:]
		}
		return table + "\u00A0" + r.marks(rest) + confidence
	}
	return tidySource(source)
}

// Sources of what the note itself says.
const (
	gumSource      = "JCGM 100:2008, Evaluation of measurement data - Guide to the expression of uncertainty in measurement (GUM), 5.1.2 and 7.2.6."
	ilacSource     = "ILAC-G8:09/2019, Guidelines on decision rules and statements of conformity, 4.2.3."
	jcgm106Source  = "JCGM 106:2012, Evaluation of measurement data - The role of measurement uncertainty in conformity assessment."
	sigmaSource    = "CODATA 2018: E. Tiesinga, P. J. Mohr, D. B. Newell, B. N. Taylor, Rev. Mod. Phys. 93 (2021) 025010; Stefan-Boltzmann constant."
	gravitySource  = "3rd General Conference on Weights and Measures, 1901: conventional acceleration of free fall."
	fourierSource  = "Fourier's law integrated over the layer, e.g. F. P. Incropera et al., Fundamentals of Heat and Mass Transfer, 6th ed. 2007, Table 3.3."
	dewPointSource = "dew point by the Magnus formula of Alduchov & Eskridge 1996, J. Appl. Meteor. 35:601-609 (coefficients from memory)"
	atmosphere     = "U.S. Standard Atmosphere, 1976, NOAA/NASA/USAF, Washington 1976."
)
