package plot

import (
	"image/color"
	"math"
	"sync"
	"testing"

	"gonum.org/v1/plot/vg"

	"stillair/templates/drawing"
)

func near(t *testing.T, what string, got, want, off float64) {
	t.Helper()
	if !(math.Abs(got-want) <= off) {
		t.Errorf("%s is %.9g, want %.9g", what, got, want)
	}
}

func at(x, y float64) vg.Point { return vg.Point{X: mm(x), Y: mm(y)} }

// segment is a path of one straight piece, in mm.
func segment(x1, y1, x2, y2 float64) vg.Path {
	var p vg.Path
	p.Move(at(x1, y1))
	p.Line(at(x2, y2))
	return p
}

func TestRecorderTurnsTheAxisAndClips(t *testing.T) {
	r := NewRecorder(100, 50)
	r.SetLineWidth(mm(0.5))
	r.Stroke(segment(10, 10, 150, 10)) // leaves the frame at the right
	r.Stroke(segment(-5, 60, 120, 60)) // above it
	l := r.Scene("").Items[0].(drawing.Line)
	if n := len(r.items); n != 1 {
		t.Fatalf("%d items, want 1", n)
	}
	for _, w := range []struct {
		what      string
		got, want float64
	}{{"x1", l.X1, 10}, {"y1", l.Y1, 40}, {"x2", l.X2, 100}, {"y2", l.Y2, 40}, {"width", l.Width, 0.5}} {
		near(t, w.what, w.got, w.want, 1e-9)
	}
}

func TestRecorderTransformsAndRestores(t *testing.T) {
	r := NewRecorder(100, 100)
	r.SetLineWidth(mm(1))
	r.Push()
	r.Translate(at(50, 50))
	r.Rotate(math.Pi / 2)
	r.Scale(2, 2)
	r.Stroke(segment(0, 0, 10, 0)) // 20 mm straight up from the middle
	r.Pop()
	r.Pop() // one too many does no harm
	r.Stroke(segment(0, 0, 10, 0))
	up, plain := r.items[0].(drawing.Line), r.items[1].(drawing.Line)
	near(t, "x2", up.X2, 50, 1e-9)
	near(t, "y2", up.Y2, 30, 1e-9)
	near(t, "width", up.Width, 2, 1e-9)
	near(t, "x2 after Pop", plain.X2, 10, 1e-9)
	near(t, "y2 after Pop", plain.Y2, 100, 1e-9)
	near(t, "width after Pop", plain.Width, 1, 1e-9)
}

func TestDashesFollowThePattern(t *testing.T) {
	r := NewRecorder(100, 100)
	r.SetLineWidth(mm(0.2))
	r.SetLineDash([]vg.Length{mm(3), mm(2)}, mm(1))
	p := segment(10, 10, 20, 10)
	p.Line(at(20, 17)) // around the corner, still in step
	r.Stroke(p)
	want := [][2]float64{{0, 2}, {4, 7}, {9, 10}, {10, 12}, {14, 17}}
	if len(r.items) != len(want) {
		t.Fatalf("%d dashes, want %d", len(r.items), len(want))
	}
	along := func(x, y float64) float64 { return x - 10 + 90 - y }
	for i, w := range want {
		l := r.items[i].(drawing.Line)
		near(t, "start", along(l.X1, l.Y1), w[0], 1e-9)
		near(t, "end", along(l.X2, l.Y2), w[1], 1e-9)
	}
}

func TestOddPatternsDrawSolidOrEnd(t *testing.T) {
	for _, pattern := range [][]vg.Length{nil, {0}, {0, 0}, {-1, 2}, {vg.Length(math.NaN())}, {mm(1e-9)}} {
		r := NewRecorder(100, 100)
		r.SetLineDash(pattern, 7)
		r.Stroke(segment(10, 10, 20, 10))
		if len(r.items) != 1 {
			t.Errorf("pattern %v: %d items", pattern, len(r.items))
		}
	}
	r := NewRecorder(100, 100)
	r.SetLineDash([]vg.Length{mm(3)}, 0) // dashes and gaps alike
	r.Stroke(segment(10, 10, 20, 10))
	if len(r.items) != 2 {
		t.Errorf("an odd pattern gives %d dashes of 3 mm on 10 mm, want 2", len(r.items))
	}
}

func TestCurvesStayWithinFlatness(t *testing.T) {
	r := NewRecorder(100, 100)
	var p vg.Path
	p.Move(at(80, 50))
	p.Arc(at(50, 50), mm(30), 0, 2*math.Pi)
	p.Close()
	r.Stroke(p)
	a := r.items[0].(drawing.Area)
	if a.Fill != nil || a.Width <= 0 {
		t.Error("a stroked circle is not an outline")
	}
	for i := range a.X {
		j := (i + 1) % len(a.X)
		near(t, "radius", math.Hypot(a.X[i]-50, a.Y[i]-50), 30, 1e-9)
		near(t, "chord", math.Hypot((a.X[i]+a.X[j])/2-50, (a.Y[i]+a.Y[j])/2-50), 30, 1.01*flatness)
	}
}

// The parabola from (0, 0) to (80, 0) with control point (40, 80) has the
// equation y = 2 x (80 - x)/80; a cubic of raised degree is the same curve.
func TestBezierCurves(t *testing.T) {
	for name, add := range map[string]func(*vg.Path){
		"quadratic": func(p *vg.Path) { p.QuadTo(at(40, 80), at(80, 0)) },
		"cubic":     func(p *vg.Path) { p.CubeTo(at(80.0/3, 160.0/3), at(80-80.0/3, 160.0/3), at(80, 0)) },
	} {
		r := NewRecorder(100, 100)
		var p vg.Path
		p.Move(at(0, 0))
		add(&p)
		r.Stroke(p)
		a := r.items[0].(drawing.Area)
		if len(a.X) < 20 {
			t.Errorf("%s: only %d corners", name, len(a.X))
		}
		for i := range a.X {
			near(t, name, 100-a.Y[i], 2*a.X[i]*(80-a.X[i])/80, 1e-9)
		}
	}
}

// area is the shoelace formula.
func area(a drawing.Area) float64 {
	s := 0.0
	for i := range a.X {
		j := (i + 1) % len(a.X)
		s += a.X[i]*a.Y[j] - a.X[j]*a.Y[i]
	}
	return math.Abs(s) / 2
}

func square(p *vg.Path, pts ...vg.Point) {
	p.Move(pts[0])
	for _, q := range pts[1:] {
		p.Line(q)
	}
	p.Close()
}

func TestFillKeepsHolesAndClips(t *testing.T) {
	r := NewRecorder(100, 100)
	r.SetColor(color.NRGBA{R: 255, A: 128})
	var p vg.Path
	square(&p, at(10, 10), at(50, 10), at(50, 50), at(10, 50))
	square(&p, at(20, 20), at(20, 40), at(40, 40), at(40, 20)) // the other way round
	r.Fill(p)
	ring := r.items[0].(drawing.Area)
	near(t, "area of the ring", area(ring), 40*40-20*20, 1e-9)
	if *ring.Fill != (drawing.Color{R: 255, G: 127, B: 127}) {
		t.Errorf("half red on white is %v", *ring.Fill)
	}
	p = nil
	square(&p, at(80, 80), at(120, 80), at(120, 120), at(80, 120))
	r.Fill(p)
	near(t, "area within the frame", area(r.items[1].(drawing.Area)), 20*20, 1e-9)
}

func TestTextSizeTurnAndWeight(t *testing.T) {
	w, err := words()
	if err != nil {
		t.Fatal(err)
	}
	r := NewRecorder(100, 100)
	f := sized(2.5)
	r.Rotate(math.Pi / 2)
	r.FillString(w.Fonts.Lookup(f, f.Size), at(20, -30), "Ra")
	r.FillString(w.Fonts.Lookup(f, 0), at(20, -30), "no size")
	r.FillString(w.Fonts.Lookup(f, f.Size), vg.Point{X: vg.Length(math.NaN())}, "nowhere")
	l := r.items[0].(drawing.Label)
	if len(r.items) != 1 || l.Turn != 90 || l.Bold || l.Anchor != drawing.Left {
		t.Errorf("%d items, %+v", len(r.items), l)
	}
	near(t, "size", l.Size, 2.5, 1e-9)
	near(t, "x", l.X, 30, 1e-9)
	near(t, "y", l.Y, 80, 1e-9)
}

func TestNothingWithoutNumbers(t *testing.T) {
	r := NewRecorder(100, 100)
	r.Stroke(segment(10, 10, math.NaN(), 10))
	r.Fill(segment(10, 10, math.Inf(1), 10))
	var p vg.Path
	p.Close()
	p.Arc(at(10, 10), vg.Length(math.Inf(1)), 0, math.NaN())
	r.Stroke(p)
	r.DrawImage(vg.Rectangle{}, nil)
	if len(r.items) != 0 {
		t.Errorf("items %v", r.items)
	}
}

// The library measures with the very advance widths the drawings use, but
// closes up pairs of letters.
func TestTextIsMeasuredWithTheFontOfTheNote(t *testing.T) {
	w, err := words()
	if err != nil {
		t.Fatal(err)
	}
	for _, s := range []string{"inside air, summer sun", "conditional pass", "temperature / °C"} {
		wide, _, _ := w.Box(s, sized(textSize))
		near(t, s, float64(wide/vg.Millimeter), drawing.TextWidth(s, textSize), 0.02*drawing.TextWidth(s, textSize))
	}
}

func TestManyAtOnce(t *testing.T) {
	o := run(t, "panel")
	var g sync.WaitGroup
	for range 4 {
		g.Go(func() { Margins(o, 170, 120) })
	}
	g.Wait()
}
