package drawing

import "math"

// viridis is the colour map "viridis" by Nathaniel J. Smith, Stéfan van der
// Walt and Eric Firing (2015), dedicated to the public domain (CC0 1.0): every
// seventeenth of its 256 rows, sRGB rounded to 8 bits.
var viridis = [...]Color{
	{0x44, 0x01, 0x54}, {0x48, 0x1A, 0x6C}, {0x47, 0x2F, 0x7D}, {0x41, 0x44, 0x87},
	{0x39, 0x56, 0x8C}, {0x31, 0x68, 0x8E}, {0x2A, 0x78, 0x8E}, {0x23, 0x88, 0x8E},
	{0x1F, 0x98, 0x8B}, {0x22, 0xA8, 0x84}, {0x35, 0xB7, 0x79}, {0x54, 0xC5, 0x68},
	{0x7A, 0xD1, 0x51}, {0xA5, 0xDB, 0x36}, {0xD2, 0xE2, 0x1B}, {0xFD, 0xE7, 0x25},
}

// The colours of ink and paper.
var (
	black = Color{0, 0, 0}
	white = Color{255, 255, 255}
)

// Viridis is the colour at t of the map, 0 (dark, cold) to 1 (light, hot);
// values outside are held at the ends. Its lightness rises all the way, so it
// also reads in grey.
func Viridis(t float64) Color {
	if math.IsNaN(t) {
		return white
	}
	at := math.Max(0, math.Min(1, t)) * float64(len(viridis)-1)
	i := min(int(at), len(viridis)-2)
	f := at - float64(i)
	mix := func(a, b uint8) uint8 { return uint8(math.Round(float64(a) + f*(float64(b)-float64(a)))) }
	a, b := viridis[i], viridis[i+1]
	return Color{mix(a.R, b.R), mix(a.G, b.G), mix(a.B, b.B)}
}

// Luminance is the relative luminance of an sRGB colour, 0 (black) to 1
// (white). Source: IEC 61966-2-1 transfer curve and weights as in W3C, Web
// Content Accessibility Guidelines 2.1, "relative luminance".
func Luminance(c Color) float64 {
	linear := func(v uint8) float64 {
		s := float64(v) / 255
		if s <= 0.04045 {
			return s / 12.92
		}
		return math.Pow((s+0.055)/1.055, 2.4)
	}
	return 0.2126*linear(c.R) + 0.7152*linear(c.G) + 0.0722*linear(c.B)
}

// inkOn is black or white, whichever stands out more from the fill.
func inkOn(fill *Color) Color {
	if fill == nil {
		return black
	}
	l := Luminance(*fill) + 0.05 // contrast (lighter + 0.05)/(darker + 0.05)
	if 1.05/l > l/0.05 {
		return white
	}
	return black
}
