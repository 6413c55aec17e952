package display

import (
	"bytes"
	"strconv"
	"strings"
	"time"

	"codeberg.org/go-pdf/fpdf"
	"github.com/go-fonts/liberation/liberationserifitalic"
	"github.com/go-fonts/liberation/liberationserifregular"
)

// PDF is the figure as a document of one page of its size, with the part of
// the typeface that it needs embedded. A notebook that is printed through
// LaTeX takes this form. It fails only when the writer of the format does.
func (d Diagram) PDF() ([]byte, error) { return d.pdf(d.draw()) }

// epoch stands for the date of making, which must not depend on the day.
var epoch = time.Date(2000, 1, 1, 0, 0, 0, 0, time.UTC)

func (d Diagram) pdf(pic drawing) ([]byte, error) {
	f := fpdf.NewCustom(&fpdf.InitType{UnitStr: "pt", Size: fpdf.SizeType{Wd: pic.width, Ht: pic.height}})
	f.SetCatalogSort(true)
	f.SetCreationDate(epoch)
	f.SetModificationDate(epoch)
	f.SetProducer("Adjoin", false)
	f.SetTitle(oneLine(printable(run{text: visible(d.Title)})), true)
	f.SetMargins(0, 0, 0)
	f.SetAutoPageBreak(false, 0)
	// The writer changes the bytes of the typeface while it cuts out a part.
	f.AddUTF8FontFromBytes("serif", "", bytes.Clone(liberationserifregular.TTF))
	f.AddUTF8FontFromBytes("serif", "I", bytes.Clone(liberationserifitalic.TTF))
	f.AddPage()
	f.SetFillColor(rgb(background))
	f.Rect(0, 0, pic.width, pic.height, "F")
	f.SetLineCapStyle("round")
	f.SetLineJoinStyle("round")
	for _, l := range pic.lines {
		f.SetDrawColor(rgb(l.color))
		f.SetLineWidth(1.3)
		f.MoveTo(l.points[0].x, l.points[0].y)
		for _, p := range l.points[1:] {
			f.LineTo(p.x, p.y)
		}
		f.DrawPath("D")
	}
	for _, m := range pic.marks {
		f.SetFillColor(rgb(background))
		f.Rect(m.center.x-m.width/2, m.center.y-m.height/2, m.width, m.height, "F")
		pdfText(f, m.text, m.center.x, m.baseline(), markSize, m.color)
	}
	for _, x := range pic.boxes {
		fill, line, stroke := x.style()
		f.SetFillColor(rgb(fill))
		f.SetDrawColor(rgb(line))
		f.SetLineWidth(stroke)
		f.RoundedRect(x.center.x-x.width/2, x.center.y-x.height/2, x.width, x.height, cornerSize, "1234", "FD")
		label, sub := x.baselines()
		pdfText(f, x.label, x.center.x, label, labelSize, ink)
		if x.sub != nil {
			pdfText(f, x.sub, x.center.x, sub, subSize, softInk)
		}
	}
	var b bytes.Buffer
	if err := f.Output(&b); err != nil {
		return nil, err
	}
	return b.Bytes(), nil
}

func pdfText(f *fpdf.Fpdf, list []run, x, y, size float64, color string) {
	shown := make([]run, len(list))
	for i, r := range list {
		shown[i] = r
		shown[i].text = printable(r)
	}
	x -= runsWidth(shown, size) / 2
	f.SetTextColor(rgb(color))
	for _, r := range shown {
		style := ""
		if r.italic {
			style = "I"
		}
		f.SetFont("serif", style, float64(size*r.scale()))
		f.Text(x, y-float64(size*r.shift()), r.text)
		x += runsWidth([]run{r}, size)
	}
}

// substitutes are what the page shows for characters that the typeface lacks.
var substitutes = map[rune]string{
	'𝔽': "F", 'ℚ': "Q", 'ℤ': "Z", 'ℝ': "R", 'ℂ': "C", 'ℕ': "N", '↦': "|→", '∈': "in", '⊂': "<", '⊆': "≤", '≅': "~=", '∘': "°",
}

// printable is the text of r with the characters that the typeface lacks
// replaced, in the end by their codes.
func printable(r run) string {
	var b strings.Builder
	for _, c := range r.text {
		if _, ok := r.typeface().width(c); ok {
			b.WriteRune(c)
		} else if s, known := substitutes[c]; known {
			b.WriteString(s)
		} else {
			b.WriteString(codePoint(c))
		}
	}
	return b.String()
}

func rgb(color string) (r, g, b int) {
	n, _ := strconv.ParseUint(strings.TrimPrefix(color, "#"), 16, 32)
	return int(n >> 16), int(n >> 8 & 255), int(n & 255)
}
