package typeset

var gaps = map[string]float64{
	",": 0.17, ":": 0.22, ";": 0.28, "!": -0.17, " ": 0.33, "quad": 1, "qquad": 2,
}

// symbols by command name.
var symbols = func() map[string]symbol {
	m := map[string]symbol{
		"{": {text: "{", class: opening}, "}": {text: "}", class: closing},
		"%": {text: "%"}, "_": {text: "_"}, "|": {text: "∥"},
		"cdot": {text: "·", class: binary}, "times": {text: "×", class: binary}, "pm": {text: "±", class: binary},
		"le": {text: "≤", class: relation}, "leq": {text: "≤", class: relation},
		"ge": {text: "≥", class: relation}, "geq": {text: "≥", class: relation},
		"ne": {text: "≠", class: relation}, "approx": {text: "≈", class: relation},
		"equiv": {text: "≡", class: relation}, "to": {text: "→", class: relation},
		"infty": {text: "∞"}, "partial": {text: "∂"}, "degree": {text: "°"}, "circ": {text: "°"},
		"sum": {text: "∑", class: function}, "int": {text: "∫", class: function}, "dots": {text: "…"}, "ldots": {text: "…"},
		"ell": {text: "ℓ"},
	}
	for _, f := range []string{"ln", "log", "exp", "sin", "cos", "tan", "max", "min", "tanh", "cosh", "sinh", "arctan"} {
		m[f] = symbol{text: f, class: function}
	}
	lower := "alpha α beta β gamma γ delta δ epsilon ε varepsilon ε zeta ζ eta η theta θ iota ι kappa κ lambda λ mu μ nu ν xi ξ pi π rho ρ sigma σ tau τ upsilon υ phi φ varphi φ chi χ psi ψ omega ω"
	upper := "Gamma Γ Delta Δ Theta Θ Lambda Λ Xi Ξ Pi Π Sigma Σ Phi Φ Psi Ψ Omega Ω"
	pairs(lower, func(name, glyph string) { m[name] = symbol{text: glyph, italic: true} })
	pairs(upper, func(name, glyph string) { m[name] = symbol{text: glyph} })
	m["pi"] = symbol{text: "π"} // a number, upright
	return m
}()
