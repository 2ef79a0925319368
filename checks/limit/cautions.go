package limit

import "slices"

// CautionHead stands on the first page of a note with a touch verdict.
const CautionHead = "This calculation supports the judgement of a licensed or chartered engineer and does not replace it. " +
	"Local codes, the authority having jurisdiction, the owner's specification and the current edition of each standard named here come first."

// cautions belong beside every touch verdict. Sources: scopes of EN 563:1994,
// ISO 13732-1:2006, ASTM C1055 and C1057; Martin & Falder, Burns 43 (2017)
// 1624-1639; manufacturers' warnings on infrared emissivity tables. Children's
// exploring, wet skin and the order of measures rest on memory.
var cautions = []string{
	"The result compares a calculated temperature with a number quoted from a named standard; the quotation may be incomplete or superseded, so read the edition that applies.",
	"ISO 13732-1 gives burn thresholds and ASTM C1055 a method; neither sets a limit by itself. The limit comes from a product standard, a regulation or the owner.",
	"Burn thresholds hold for contact of 0.5 s or longer with a smooth, dry surface that keeps its temperature during contact.",
	"They do not hold where about 10 % or more of the skin, more than 10 % of the head, or vital parts of the face can touch; severe injury is then possible even at 43 °C and below.",
	"They mark the start of a superficial burn, not of pain or of the startled movement that can cause a fall; pain begins just above 43 °C of the skin.",
	"The lower edge of each threshold band is used; above it a burn is possible, above the upper edge it is expected.",
	"They do not cover flames, hot air, radiant heat without contact, chemicals, electricity or surfaces that heat themselves further while touched.",
	"Children, elderly, infirm, disabled or drowsy persons and anyone who may be trapped let go more slowly: use a contact time of at least 60 s for them.",
	"Long or trapped contact can kill well below 60 °C: look at pinch points and ways of escape.",
	"Wet skin or clothing improves the contact; gloves and other protective equipment count only where the work procedure demands them and they are rated for it.",
	"Each face has one calculated temperature. Hot spots above a component, at bolts, hinges, handles, seams, vents, flanges, supports, gaps or wet insulation are hotter and must be looked for.",
	"Sun, hot neighbours, blocked sides, dust, altitude and failed or clogged ventilation count only where the case declares them.",
	"Emissivity drifts with polish, dirt, weather and paint; low emissivity makes a surface hotter. Judge with the whole range, and never with a value for an infrared camera's band.",
	"Installed insulation conducts more than its data sheet says, because of joints, supports, moisture, ageing and workmanship.",
	"Surface classes for explosive atmospheres and the ignition of dust, cloth or oil are separate checks.",
	"Measure before relying on the result: in steady state, at several points with the expected hot spots, with ambient, load and uncertainty recorded.",
}

// Cautions lists what a note with a touch verdict must tell its reader.
func Cautions() []string { return slices.Clone(cautions) }
