package typeset

import (
	"fmt"
	"html"
	"strings"
	"unicode"
)

// MathML is the formula as presentation MathML for a page (MathML Core).
func (f *Formula) MathML() string {
	return `<math display="block">` + mathRow(f.root) + `</math>`
}

func mathRow(r row) string {
	var b strings.Builder
	for _, n := range r {
		b.WriteString(mathNode(n))
	}
	return "<mrow>" + b.String() + "</mrow>"
}

func mathNode(n node) string {
	switch n := n.(type) {
	case row:
		return mathRow(n)
	case symbol:
		return mathSymbol(n)
	case fraction:
		return "<mfrac>" + mathRow(n.over) + mathRow(n.under) + "</mfrac>"
	case scripts:
		return mathScripts(n)
	case root:
		if n.degree != nil {
			return "<mroot>" + mathRow(n.body) + mathRow(n.degree) + "</mroot>"
		}
		return "<msqrt>" + mathRow(n.body) + "</msqrt>"
	case fence:
		return "<mrow>" + mathFence(n.left) + mathRow(n.body) + mathFence(n.right) + "</mrow>"
	case accent:
		mark := map[string]string{"dot": "˙", "bar": "¯"}[n.mark]
		return "<mover>" + mathRow(n.body) + "<mo>" + mark + "</mo></mover>"
	case gap:
		return fmt.Sprintf(`<mspace width="%.2fem"/>`, float64(n))
	}
	return ""
}

func mathFence(s string) string {
	if s == "" {
		return ""
	}
	return `<mo stretchy="true">` + html.EscapeString(s) + "</mo>"
}

func mathSymbol(s symbol) string {
	text := html.EscapeString(s.text)
	switch {
	case s.italic:
		return "<mi>" + text + "</mi>"
	case s.class != ordinary && s.class != function:
		return `<mo stretchy="false">` + text + "</mo>"
	case s.text != "" && unicode.IsDigit([]rune(s.text)[0]):
		return "<mn>" + text + "</mn>"
	case s.class == function || len([]rune(s.text)) > 1:
		return "<mtext>" + text + "</mtext>"
	}
	return `<mi mathvariant="normal">` + text + "</mi>"
}

func mathScripts(s scripts) string {
	base := mathNode(s.base)
	switch {
	case s.sub != nil && s.sup != nil:
		return "<msubsup>" + base + mathRow(s.sub) + mathRow(s.sup) + "</msubsup>"
	case s.sub != nil:
		return "<msub>" + base + mathRow(s.sub) + "</msub>"
	}
	return "<msup>" + base + mathRow(s.sup) + "</msup>"
}
