package plot

import (
	"bytes"
	"fmt"
	"sync"

	"codeberg.org/go-fonts/dejavu/dejavusans"
	"codeberg.org/go-fonts/dejavu/dejavusansbold"
	xfont "golang.org/x/image/font"
	"golang.org/x/image/font/opentype"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
)

// sans is the typeface of the note.
var sans = font.Font{Typeface: "DejaVu", Variant: "Sans"}

// words measures and writes with the fonts of the note. It keeps them in a
// cache of its own, so that the defaults of the plot library stay untouched.
var words = sync.OnceValues(func() (text.Plain, error) {
	cache := font.NewCache(nil)
	for _, f := range []struct {
		ttf    []byte
		weight xfont.Weight
	}{{dejavusans.TTF, xfont.WeightNormal}, {dejavusansbold.TTF, xfont.WeightBold}} {
		face, err := opentype.Parse(bytes.Clone(f.ttf)) // others write to the bytes of the module
		if err != nil {
			return text.Plain{}, fmt.Errorf("the font of the charts cannot be read: %w", err)
		}
		key := sans
		key.Weight = f.weight
		cache.Add(font.Collection{{Font: key, Face: face}})
	}
	return text.Plain{Fonts: cache}, nil
})

// sized is the typeface with capitals of a height in mm.
func sized(mm float64) font.Font { return font.From(sans, vg.Length(mm/capHeight)*vg.Millimeter) }
