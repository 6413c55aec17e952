package display

import (
	"sync"

	"github.com/go-fonts/liberation/liberationserifitalic"
	"github.com/go-fonts/liberation/liberationserifregular"
	"golang.org/x/image/font"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
)

// The figures are set in Liberation Serif, whose characters are as wide as
// those of Times New Roman: what is measured here holds for the text in an SVG
// whichever of the two its reader has.

// scriptScale is the size of a script relative to the line that carries it.
var scriptScale = []float64{1, 0.7, 0.53, 0.45}

// scriptShift is how far scripts are moved upwards, in sizes of the line that
// carries them.
var scriptShift = map[byte]float64{'^': 0.43, '_': -0.2}

// scale is the size of the run relative to the base line.
func (r run) scale() float64 { return scriptScale[len(r.path)] }

// shift is how far the run stands above the base line, in sizes of it.
func (r run) shift() float64 {
	s := 0.0
	for i := range len(r.path) {
		s += float64(scriptShift[r.path[i]] * scriptScale[i])
	}
	return s
}

type typeface struct {
	font    *sfnt.Font
	advance map[rune]float64 // per size
	buffer  sfnt.Buffer
	mu      sync.Mutex
}

// unitsPerSize is the resolution in which the widths are read.
const unitsPerSize = 2048

var upright, slanted = sync.OnceValue(func() *typeface { return newTypeface(liberationserifregular.TTF) }),
	sync.OnceValue(func() *typeface { return newTypeface(liberationserifitalic.TTF) })

func newTypeface(ttf []byte) *typeface {
	f, err := sfnt.Parse(ttf)
	if err != nil {
		panic(err) // the typeface is compiled in
	}
	return &typeface{font: f, advance: map[rune]float64{}}
}

// width of a character relative to the size; ok is false when the typeface
// does not have it.
func (t *typeface) width(c rune) (w float64, ok bool) {
	t.mu.Lock()
	defer t.mu.Unlock()
	if w, known := t.advance[c]; known {
		return w, w > 0
	}
	w = 0
	if glyph, err := t.font.GlyphIndex(&t.buffer, c); err == nil && glyph != 0 {
		if a, err := t.font.GlyphAdvance(&t.buffer, glyph, fixed.I(unitsPerSize), font.HintingNone); err == nil {
			w = float64(a) / (64 * unitsPerSize)
		}
	}
	t.advance[c] = w
	return w, w > 0
}

func (r run) typeface() *typeface {
	if r.italic {
		return slanted()
	}
	return upright()
}

// missingWidth is what is allowed for each terminal column of a character that
// the typeface lacks.
const missingWidth = 0.6

// runsWidth is the width of runs when the base line has the given size.
func runsWidth(list []run, size float64) float64 {
	total := 0.0
	for _, r := range list {
		sum := 0.0
		for _, c := range r.text {
			w, ok := r.typeface().width(c)
			if !ok {
				w = missingWidth * float64(max(textWidth(string(c)), 1))
			}
			sum += w
		}
		total += float64(sum * r.scale() * size)
	}
	return total
}
