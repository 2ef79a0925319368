package pdf

import (
	"bytes"
	"errors"
	"fmt"
	"sync"

	"codeberg.org/go-fonts/dejavu/dejavusanscondensed"
	"codeberg.org/go-fonts/dejavu/dejavusanscondensedbold"
	"codeberg.org/go-fonts/dejavu/dejavusanscondensedoblique"
	"codeberg.org/go-fonts/dejavu/dejavusansmono"
	"github.com/jung-kurt/gofpdf"
	"golang.org/x/image/font"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
)

// Face is one of the fonts a document may use: two families, DejaVu Sans
// Condensed in three cuts and DejaVu Sans Mono for listings.
type Face int

// The faces.
const (
	Regular Face = iota
	Bold
	Italic
	Mono
)

// CapHeight is the height of a capital letter of DejaVu Sans, in em.
const CapHeight = 0.729

// pointMM is the length of a typographic point (1/72 inch) in millimetres.
const pointMM = 25.4 / 72

var faces = [...]struct {
	family, style string
	ttf           []byte
}{
	Regular: {"DejaVuSansCondensed", "", dejavusanscondensed.TTF},
	Bold:    {"DejaVuSansCondensed", "B", dejavusanscondensedbold.TTF},
	Italic:  {"DejaVuSansCondensed", "I", dejavusanscondensedoblique.TTF},
	Mono:    {"DejaVuSansMono", "", dejavusansmono.TTF},
}

// addFonts registers all faces. The library pads the bytes it is given while
// it computes a checksum, so every document gets its own copy.
func addFonts(p *gofpdf.Fpdf) error {
	for _, f := range faces {
		p.AddUTF8FontFromBytes(f.family, f.style, bytes.Clone(f.ttf))
		p.SetFont(f.family, f.style, 10)
		if err := p.Error(); err != nil {
			return fmt.Errorf("font %s%s: %w", f.family, f.style, err)
		}
	}
	return nil
}

var parsed = sync.OnceValues(func() ([]*sfnt.Font, error) {
	fonts := make([]*sfnt.Font, len(faces))
	var errs error
	for i, f := range faces {
		var err error
		fonts[i], err = sfnt.Parse(f.ttf)
		errs = errors.Join(errs, err)
	}
	return fonts, errs
})

// Extent is the ink of a glyph in em: Up above the baseline, Down below it,
// Left and Right from the origin, and the advance width.
type Extent struct{ Up, Down, Left, Right, Advance float64 }

type glyph struct {
	face Face
	r    rune
}

type metric struct {
	Extent
	has bool
}

var metrics sync.Map // glyph -> metric

// Has reports whether the face holds a glyph for the rune.
func Has(f Face, r rune) bool { return metricOf(f, r).has }

// ExtentOf measures one glyph. An unknown rune measures as a capital letter.
func ExtentOf(f Face, r rune) Extent { return metricOf(f, r).Extent }

func metricOf(f Face, r rune) metric {
	if m, ok := metrics.Load(glyph{f, r}); ok {
		return m.(metric)
	}
	m := measure(f, r)
	metrics.Store(glyph{f, r}, m)
	return m
}

func measure(f Face, r rune) metric {
	unknown := metric{Extent{Up: CapHeight, Right: 0.6, Advance: 0.6}, false}
	fonts, err := parsed()
	if err != nil {
		return unknown
	}
	var buf sfnt.Buffer
	g, err := fonts[f].GlyphIndex(&buf, r)
	if err != nil || g == 0 {
		return unknown
	}
	const em = 1000 // measure at 1000 units an em
	b, adv, err := fonts[f].GlyphBounds(&buf, g, fixed.I(em), font.HintingNone)
	if err != nil {
		return unknown
	}
	unit := func(v fixed.Int26_6) float64 { return float64(v) / 64 / em }
	return metric{Extent{Up: -unit(b.Min.Y), Down: unit(b.Max.Y), Left: unit(b.Min.X), Right: unit(b.Max.X), Advance: unit(adv)}, true}
}
