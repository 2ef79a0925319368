package calcnote

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"path"
	"slices"
	"strings"

	"stillair/checks/limit"
	"stillair/templates/pdf"
)

const cautionsTitle = "Cautions and limits of use"

// cautions are the limits of use, and the burn cautions beside touch verdicts.
func (n *note) cautions() {
	n.section(cautionsTitle)
	n.text(limit.CautionHead)
	general := []string{
		"The note is valid only for the inputs it lists. A change of an input, a method, a limit or the program version calls for a new calculation, review and signature.",
		"Temperatures are means over faces; parts above components, at edges and at joints are hotter.",
		"Verify by measurement before relying on the result.",
	}
	switch {
	case len(n.o.Cautions) == 0:
		general = append(general, "No touch limit was judged: the note says nothing about burns on contact.")
	case !n.burnJudged():
		general = append(general, noBurnThreshold+" What follows is for readers who compare with one.")
	}
	for _, s := range general {
		n.bullet(s)
	}
	if len(n.o.Cautions) > 0 {
		n.part("Touch and burn data", 20)
		for _, s := range n.cautionList() {
			n.bullet(s)
		}
	}
}

// cautionList leaves out what tells about thresholds that were not used.
func (n *note) cautionList() []string {
	if n.burnJudged() {
		return n.o.Cautions
	}
	return slices.DeleteFunc(slices.Clone(n.o.Cautions), func(s string) bool {
		return strings.HasPrefix(s, "The lower edge of each threshold band") || strings.HasPrefix(s, "The result compares")
	})
}

// review is the list a reviewer works through.
func (n *note) review() {
	n.section("Assumptions for the reviewer")
	if len(n.o.Assumptions) == 0 && len(n.o.Assumed) == 0 {
		n.text("The outcome lists no assumptions.")
		return
	}
	n.text("Tick each one that was reviewed and accepted.")
	for i, s := range n.o.Assumptions {
		n.item(fmt.Sprintf("☐ %d", i+1), s)
	}
	if len(n.o.Assumed) == 0 {
		return
	}
	var rows []pdf.Row
	for _, in := range n.o.Assumed {
		rows = append(rows, cells("☐", in.Label, in.Typed, siOf(in), n.refs.sourceMark(in.Source)))
	}
	n.partTable("Values taken by default", "", []pdf.Column{{Head: "", Width: 6}, {Head: "Input", Width: 50}, {Head: "Taken as", Width: 26}, {Head: "SI value", Width: 24}, {Head: "Source", Width: 64}}, rows)
}

// identification says which program and data made the note, from what.
func (n *note) identification() {
	n.section("Identification")
	p := n.o.Program
	sum := sha256.Sum256(n.data)
	rows := []pdf.Row{
		cells("Program", strings.TrimSpace(p.Name+" "+p.Version)),
		cells("Embedded data", dash(p.Data)),
		cells("Result schema", n.o.Schema),
		cells("Inputs, SHA-256", dash(n.o.Case.SHA256)),
		cells("Results, SHA-256", hex.EncodeToString(sum[:])),
	}
	if n.o.File != nil {
		rows = append(rows, cells("Case file", baseName(n.o.File.Name)), cells("Attachments", caseAttachment+" (the case file, byte for byte), "+resultAttachment+" (all results)"))
	}
	n.table([]pdf.Column{{Head: "What", Width: 40}, {Head: "Which", Width: 130}}, rows)
	n.text("A reader who recomputes the SHA-256 of the attached case file and finds another value holds an edited copy. The numbers on paper can be rebuilt from the attached case file with the program version named.")
	n.replaced()
}

// baseName is the name of a file without its folders.
func baseName(name string) string {
	return path.Base(strings.ReplaceAll(name, `\`, "/"))
}

// replaced reports characters of the case that the fonts cannot print.
func (n *note) replaced() {
	if list := n.unprintable(); len(list) > 0 {
		n.textf("Characters of the case file that these fonts cannot print are shown as �: %s. The attached case file holds them unchanged.", strings.Join(list, ", "))
	}
}

// unprintable names the characters of the case file that print as a mark.
func (n *note) unprintable() []string {
	if n.o.File == nil {
		return nil
	}
	var list []string
	for _, r := range string(n.o.File.Text) {
		name := fmt.Sprintf("U+%04X", r)
		if !pdf.Printable(r) && !slices.Contains(list, name) && len(list) < 20 {
			list = append(list, name)
		}
	}
	return list
}

// references lists the sources by number.
func (n *note) references() {
	n.section("References")
	n.text("Numbers and forms are quoted from these sources; where a record says that a form was not seen in print, check it against the source.")
	for i, s := range n.refs.list {
		n.item(fmt.Sprintf("[%d]", i+1), capital(s))
	}
}

// listing prints the case file with line numbers.
func (n *note) listing() {
	n.section("Case file")
	if n.o.File == nil {
		n.text("The case file is not available in this outcome.")
		return
	}
	d := n.d
	char := d.TextWidth("0", monoStyle)
	perLine := int((n.width() - 12) / char)
	var lines [][2]string
	for i, line := range bytes.Split(bytes.TrimRight(n.o.File.Text, "\r\n"), []byte("\n")) {
		rest := []rune(strings.ReplaceAll(strings.TrimRight(string(line), "\r"), "\t", "    "))
		number := fmt.Sprint(i + 1)
		for first := true; first || len(rest) > 0; first = false {
			part := rest[:listingBreak(rest, perLine)]
			rest = rest[len(part):]
			lines = append(lines, [2]string{number, string(part)})
			number = "↪"
		}
	}
	n.listingLines(lines)
}

func (n *note) listingLines(lines [][2]string) {
	d := n.d
	lead := monoStyle.Em() * n.listingLead(len(lines))
	for _, l := range lines {
		d.Need(lead)
		d.TextRight(n.left()+8, d.Y+0.8*lead, l[0], labelStyle)
		d.Text(n.left()+12, d.Y+0.8*lead, l[1], monoStyle)
		d.Y += lead
	}
}

// listingLead is the distance of lines in em: the nearest to the usual one that
// does not leave a last page with a few lines only.
func (n *note) listingLead(lines int) float64 {
	const usual, few = 132, 12 // hundredths of an em, lines
	d := n.d
	good := func(hundredths int) bool {
		h := monoStyle.Em() * float64(hundredths) / 100
		rest, page := lines-int((d.Bottom()-d.Y)/h), int((d.Bottom()-d.Top())/h)
		return rest <= 0 || rest%page == 0 || rest%page >= few
	}
	for step := 0; step <= 34; step += 2 {
		switch {
		case step <= 22 && good(usual-step):
			return float64(usual-step) / 100
		case good(usual + step):
			return float64(usual+step) / 100
		}
	}
	return float64(usual) / 100
}

// listingBreak is how many characters go on a line: all, or up to the last
// space when one is near the end.
func listingBreak(text []rune, perLine int) int {
	if len(text) <= perLine {
		return len(text)
	}
	for i := perLine; i > perLine-24; i-- {
		if text[i-1] == ' ' {
			return i
		}
	}
	return perLine
}
