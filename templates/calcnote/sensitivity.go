package calcnote

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks"
	"stillair/checks/unit"
	"stillair/templates/pdf"
)

// effectRows is how many effects are worth a row.
const effectRows = 10

// sensitivity ranks what moves the temperatures that decide.
func (n *note) sensitivity() {
	n.sectionRoom("What matters most", 56)
	places := n.decisivePlaces()
	if len(n.load().Effects) == 0 || len(places) == 0 {
		n.text("Not computed for the governing load case.")
		return
	}
	n.textf("Load case “%s”: change of the temperature when one input is shifted both ways, the largest first. Filled bar: shifted up; hollow bar: shifted down. All bars of a table have one scale.", n.load().Name)
	for _, at := range places {
		n.effects(at)
	}
}

// decisivePlaces are the place of the decisive check and the hottest face.
func (n *note) decisivePlaces() []string {
	var list []string
	l := n.load()
	if v := l.Deciding(); v != nil {
		list = append(list, v.At)
	}
	hot, _ := hottestFace(*l)
	at := hot.At
	if len(list) == 0 && len(l.Temps) > 0 {
		list = append(list, l.Temps[0].At)
	}
	if at != "" && !slices.Contains(list, at) {
		list = append(list, at)
	}
	return list
}

func (n *note) effects(at string) {
	ranked := n.load().Ranked(at)
	if len(ranked) == 0 {
		return
	}
	n.part(capital(at), 26)
	scale := n.scaleOf(ranked[0])
	const barWidth = 31.0 // mm
	var rows []pdf.Row
	for i, e := range ranked {
		if i == effectRows || i > 0 && n.negligible(e) {
			rows = append(rows, cells("", fmt.Sprintf("%s with smaller effects: in the attached results", plural(len(ranked)-i, "more shift", "more shifts"))))
			break
		}
		row := cells(fmt.Sprint(i+1), e.Of, e.Shift, n.effect(e.UpK), n.effect(e.DownK), "")
		if scale > 0 {
			share := func(k float64) float64 { return n.sys.Value(unit.TemperatureDifference, k) / scale }
			row.Cells[5] = pdf.Cell{Runs: []pdf.Run{{Inline: bar{barWidth, share(e.UpK), share(e.DownK)}}}}
		}
		rows = append(rows, row)
	}
	n.table([]pdf.Column{{Head: "", Width: 6, Align: pdf.AlignRight}, {Head: "Input shifted", Width: 70}, {Head: "Shift", Width: 24},
		{Head: "Up / " + n.diffUnit(), Width: 17, Align: pdf.AlignDecimal}, {Head: "Down / " + n.diffUnit(), Width: 19, Align: pdf.AlignDecimal},
		{HeadRuns: []pdf.Run{{Inline: barScale{barWidth, exact(scale)}}}, Width: 36, Align: pdf.AlignCentre}}, rows)
	for _, t := range n.load().Temps {
		if t.At == at {
			n.runs(pdf.Run{Text: "Together: "}, inline(`U_{+}`), pdf.Run{Text: " = " + n.uncertainty(t.PlusK) + ", "}, inline(`U_{-}`),
				pdf.Run{Text: " = " + n.uncertainty(t.MinusK) + " on " + n.temp(t.K) + "."})
		}
	}
}

// negligible tells whether an effect would print as zero.
func (n *note) negligible(e checks.Effect) bool {
	return n.sys.Value(unit.TemperatureDifference, math.Max(math.Abs(e.UpK), math.Abs(e.DownK))) < 0.005
}

// scaleOf is where the bars of a table end, in display units: the largest
// effect rounded up.
func (n *note) scaleOf(largest checks.Effect) float64 {
	v := n.sys.Value(unit.TemperatureDifference, math.Max(math.Abs(largest.UpK), math.Abs(largest.DownK)))
	up, _ := unit.RoundUp(v)
	return up
}

func (n *note) effect(k float64) string {
	return signText(n.sys.Value(unit.TemperatureDifference, k), 2)
}

// signText is a number with its sign; zero has none.
func signText(x float64, decimals int) string {
	s := fmt.Sprintf("%+.*f", decimals, x)
	if strings.Trim(s, "+-0.") == "" {
		return s[1:]
	}
	return minus(s)
}
