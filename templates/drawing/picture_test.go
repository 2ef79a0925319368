package drawing

import (
	"bytes"
	"encoding/xml"
	"errors"
	"io"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"codeberg.org/go-fonts/dejavu/dejavusans"
	"golang.org/x/image/font"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"

	"stillair/checks"
)

func TestViridisGetsLighterAllTheWay(t *testing.T) {
	last := -1.0
	for i := 0; i <= 1000; i++ {
		l := Luminance(Viridis(float64(i) / 1000))
		if l < last-1e-3 { // an 8-bit step of blue
			t.Fatalf("luminance falls from %g to %g at %d", last, l, i)
		}
		last = math.Max(last, l)
	}
}

// Rows of the published table of viridis (Smith, van der Walt & Firing 2015) as
// sRGB fractions, in print; rows 8 and 60 lie between two of ours.
func TestViridisAgreesWithThePublishedTable(t *testing.T) {
	rows := []struct {
		row     float64
		r, g, b float64
	}{
		{0, 0.26700401, 0.00487433, 0.32941519},
		{51, 0.25393498, 0.26525384, 0.52998273},
		{8, 0.2770184, 0.05034437, 0.37571452},
		{60, 0.23744138, 0.30520222, 0.5419214},
		{255, 0.99324789, 0.90615657, 0.1439362},
	}
	for _, w := range rows {
		c := Viridis(w.row / 255)
		for i, d := range []float64{float64(c.R) - 255*w.r, float64(c.G) - 255*w.g, float64(c.B) - 255*w.b} {
			if math.Abs(d) > 1 {
				t.Errorf("row %g channel %d is off by %.1f of 255", w.row, i, d)
			}
		}
	}
	if Viridis(-1) != Viridis(0) || Viridis(2) != Viridis(1) {
		t.Error("the ends are not held")
	}
}

func TestLuminanceOfBlackAndWhite(t *testing.T) {
	if Luminance(black) != 0 || math.Abs(Luminance(white)-1) > 1e-9 {
		t.Errorf("black %g, white %g", Luminance(black), Luminance(white))
	}
}

// The font itself is the measure.
func TestTextWidthAgainstTheFont(t *testing.T) {
	f, err := sfnt.Parse(dejavusans.TTF)
	if err != nil {
		t.Fatal(err)
	}
	var buf sfnt.Buffer
	em := fixed.Int26_6(f.UnitsPerEm())
	metrics, err := f.Metrics(&buf, em, font.HintingNone)
	if err != nil {
		t.Fatal(err)
	}
	if math.Abs(float64(metrics.CapHeight)) != capUnits {
		t.Errorf("capital height %d, want %d", capUnits, metrics.CapHeight)
	}
	check := func(r rune, exact bool) {
		g, err := f.GlyphIndex(&buf, r)
		if err != nil || g == 0 {
			return
		}
		a, err := f.GlyphAdvance(&buf, g, em, font.HintingNone)
		if err != nil {
			t.Fatal(err)
		}
		if got := int(runeWidth(r)); got < int(a) || exact && got != int(a) {
			t.Errorf("%q is %d wide, the font says %d", r, got, a)
		}
	}
	for r := rune(' '); r <= '~'; r++ {
		check(r, true)
	}
	for r := range advanceMore {
		check(r, true)
	}
	for r := rune(0xA0); r < 0x150; r++ {
		check(r, false)
	}
}

func TestFitAndWrap(t *testing.T) {
	long := "a rather long name of a material that goes on"
	if s := fit(long, 2.5, 40); TextWidth(s, 2.5) > 40 || !strings.HasSuffix(s, "...") {
		t.Errorf("fit gives %q", s)
	}
	for _, s := range wrap(long, 2.5, 50) {
		if TextWidth(s, 2.5) > 50 {
			t.Errorf("%q is too wide", s)
		}
	}
	if s := fit("abc", 2.5, 0); s != "" {
		t.Errorf("no room gives %q", s)
	}
}

// ends measures the bands (areas of many corners without outline): the height
// of all their left ends at the leftmost place and of all right ends at the
// rightmost.
func ends(s Scene) (left, right float64) {
	x0, x1 := math.Inf(1), math.Inf(-1)
	for _, a := range areasOf(s) {
		if len(a.X) == 50 {
			b := boundsOf(polygonOf(a))
			x0, x1 = math.Min(x0, b.x0), math.Max(x1, b.x1)
		}
	}
	for _, a := range areasOf(s) {
		n := len(a.X)
		if n != 50 {
			continue
		}
		if math.Abs(a.X[0]-x0) < 1e-9 {
			left += a.Y[n-1] - a.Y[0]
		}
		if math.Abs(a.X[n/2-1]-x1) < 1e-9 {
			right += a.Y[n/2] - a.Y[n/2-1]
		}
	}
	return left, right
}

func TestHeatBalanceConservesHeat(t *testing.T) {
	for name, o := range balances() {
		s := HeatBalance(o, 0, 170, 95)
		in, out := ends(s)
		if in <= 0 || math.Abs(in-out) > 1e-6*in {
			t.Errorf("%s: bands come in %.4f mm wide and leave %.4f mm wide", name, in, out)
		}
		for _, f := range append(faults(s), struck(s)...) {
			t.Errorf("%s: %s", name, f)
		}
	}
}

func TestBandsAreProportionalToWatts(t *testing.T) {
	s := HeatBalance(balances()["plate"], 0, 170, 95)
	var widths []float64
	for _, a := range areasOf(s) {
		if len(a.X) == 50 && (*a.Fill == convectionColour || *a.Fill == radiationColour) {
			widths = append(widths, a.Y[49]-a.Y[0])
		}
	}
	watts := []float64{13.5, 16.5, 9, 11} // 45 % and 55 % of 30 W and of 20 W
	if len(widths) != len(watts) {
		t.Fatalf("%d bands, want %d", len(widths), len(watts))
	}
	for i := range watts {
		if math.Abs(widths[i]/widths[0]-watts[i]/watts[0]) > 1e-9 {
			t.Errorf("band %d is %.3f of the first, the heat %.3f", i, widths[i]/widths[0], watts[i]/watts[0])
		}
	}
}

func TestSmallPathsAreDrawnTogether(t *testing.T) {
	s := HeatBalance(balances()["box_six"], 0, 170, 95)
	if !named(s, "others") || !named(s, "0.5\u00A0%") { // 1.5 W of 326.5 W
		t.Error("the bottom is not among the others")
	}
}

func TestColdBodyTakesHeatFromAirAndSurroundings(t *testing.T) {
	s := HeatBalance(balances()["vessel_cold"], 0, 170, 95)
	for _, w := range []string{"warm air", "warm surroundings", "taken up", "contents"} {
		if !named(s, w) {
			t.Errorf("no label %q", w)
		}
	}
}

func TestMissingHeatIsNotHidden(t *testing.T) {
	o := balances()["plate"]
	o.Loads[0].Heat[4].W *= 0.9 // the source
	if s := HeatBalance(o, 0, 170, 95); !named(s, "not accounted for") {
		t.Error("a gap of a tenth is not shown")
	}
}

func TestHeatBalanceOfRandomPathsHasReadableLabels(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 7))
	for n := range 500 {
		o := randomOutcome(r, kinds[r.IntN(len(kinds))])
		w := make([]float64, 6)
		for i := range w {
			w[i] = math.Pow(10, 5*r.Float64()-1)
			if r.IntN(6) == 0 {
				w[i] = -w[i]
			}
		}
		shed(o, w...)
		s := HeatBalance(o, 0, 140+60*r.Float64(), 70+50*r.Float64())
		in, out := ends(s)
		if math.Abs(in-out) > 1e-6*in {
			t.Fatalf("picture %d: in %g out %g mm", n, in, out)
		}
		if list := append(faults(s), struck(s)...); len(list) > 0 {
			t.Fatalf("picture %d: %s", n, strings.Join(list, "; "))
		}
	}
}

func TestSVGIsWellFormedAndRepeatable(t *testing.T) {
	for name, o := range samples() {
		var a, b bytes.Buffer
		for _, w := range []*bytes.Buffer{&a, &b} {
			if err := SVG(w, Body(o, 0, 170, 105)); err != nil {
				t.Fatal(err)
			}
		}
		if !bytes.Equal(a.Bytes(), b.Bytes()) {
			t.Errorf("%s: two runs differ", name)
		}
		text := a.String()
		for _, want := range []string{`role="img"`, "<title>Drawing of the " + o.Loads[0].Case.Body.Kind, `width="170mm"`} {
			if !strings.Contains(text, want) {
				t.Errorf("%s: no %s", name, want)
			}
		}
		dec := xml.NewDecoder(&a)
		for {
			if _, err := dec.Token(); errors.Is(err, io.EOF) {
				break
			} else if err != nil {
				t.Fatalf("%s: %v", name, err)
			}
		}
		if strings.Contains(text, "NaN") || strings.Contains(text, "Inf") {
			t.Errorf("%s: not a number", name)
		}
	}
}

type broken struct{}

func (broken) Write([]byte) (int, error) { return 0, errors.New("disk full") }

func TestSVGReportsWriteErrors(t *testing.T) {
	o := &checks.Outcome{}
	if err := SVG(broken{}, Body(o, 0, 100, 100)); err == nil {
		t.Error("a failed write gives no error")
	}
}

func TestSVGEscapesText(t *testing.T) {
	var b bytes.Buffer
	s := Scene{W: 10, H: 10, Title: "a < b & c", Items: []Item{Label{Text: "<x>", Size: 2.5, Bold: true, Turn: 90}}}
	if err := SVG(&b, s); err != nil {
		t.Fatal(err)
	}
	for _, want := range []string{"a &lt; b &amp; c", "&lt;x&gt;", `font-weight="bold"`, "rotate(-90 0 0)"} {
		if !strings.Contains(b.String(), want) {
			t.Errorf("no %s in %s", want, b.String())
		}
	}
}
