package limit

import "math"

// DecisionRule says how a verdict takes the uncertainty into account, for the
// note that prints it.
const DecisionRule = "Decision rule: the four-way rule of ILAC-G8:09/2019, 4.2.3, with a guard band w equal to the expanded uncertainty U of the calculated temperature (coverage factor 2). " +
	"For a highest temperature: pass when the value is at or below the limit less w; conditional pass above that and up to the limit; " +
	"conditional fail above the limit and up to the limit plus w; fail above that. For a lowest temperature the same holds the other way round. " +
	"The conformance probability takes the value as normally distributed with a standard uncertainty of U/2."

// The words of the rule, from best to worst.
const (
	Pass            = "pass"
	ConditionalPass = "conditional pass"
	ConditionalFail = "conditional fail"
	Fail            = "fail"
)

// Judge compares a calculated value with a limit, both in the same unit, under
// DecisionRule. The expanded uncertainty U (coverage factor 2) is also the guard
// band. With lower the value must not fall below the limit, otherwise it must
// not exceed it.
//
// The conformance is the probability that the limit is met, 0 to 1, for a
// normal law with the standard uncertainty u = U/2 (JCGM 106:2012). Without
// uncertainty it is 1 or 0. A value or limit that is no finite number, or an
// uncertainty that is no number, cannot show anything: fail, with conformance 0.
func Judge(value, limit, U float64, lower bool) (word string, conformance float64) {
	margin := limit - value
	if lower {
		margin = -margin
	}
	U = math.Abs(U)
	if math.IsNaN(margin) || math.IsInf(margin, 0) || math.IsNaN(U) {
		return Fail, 0
	}
	return zone(margin, U), probability(margin, U/2)
}

// zone is the word for a margin, positive on the good side, and a guard band.
func zone(margin, w float64) string {
	switch {
	case margin >= w:
		return Pass
	case margin >= 0:
		return ConditionalPass
	case margin >= -w:
		return ConditionalFail
	}
	return Fail
}

// probability that a normal deviate of standard uncertainty u stays within a
// margin: Φ(margin/u).
func probability(margin, u float64) float64 {
	switch {
	case u == 0 && margin >= 0:
		return 1
	case u == 0:
		return 0
	}
	return math.Erfc(-margin/u/math.Sqrt2) / 2
}
