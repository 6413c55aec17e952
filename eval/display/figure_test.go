package display

import (
	"bytes"
	"encoding/base64"
	"math"
	"regexp"
	"strconv"
	"strings"
	"testing"
)

// Widths in thousandths of the size, from the metrics of Times Roman and Times
// Italic (Adobe Systems, Font Metrics for PDF Core 14 Fonts), from memory; the
// typeface here has the same widths.
func TestWidths(t *testing.T) {
	for _, c := range []struct {
		text   string
		italic bool
		want   float64
	}{
		{"0123456789", false, 5000}, {"F", true, 611}, {"g", true, 500}, {"a", false, 444}, {"M", false, 889}, {" ", false, 250}, {"Times", false, 611 + 278 + 778 + 444 + 389},
	} {
		if got := runsWidth([]run{{text: c.text, italic: c.italic}}, 1000); math.Abs(got-c.want) > 1*float64(len(c.text)) {
			t.Errorf("%q is %g wide, want %g", c.text, got, c.want)
		}
	}
	// A script is smaller than its line, and one in a script smaller still.
	if a, b, c := runsWidth(runs("x2"), 10), runsWidth(runs("x^2"), 10), runsWidth(runs("x^{y^2}"), 10)-runsWidth(runs("x^y"), 10); !(a > b && runsWidth(runs("2"), 10) > c/0.55) {
		t.Errorf("widths of 2 on the line, raised, raised twice: %g %g %g", a, b, c)
	}
}

func TestSVG(t *testing.T) {
	for _, n := range []int{1, 12, 60, 5040} {
		d := divisorLattice(n)
		svg := d.SVG()
		wellFormed(t, svg)
		for _, banned := range []string{"<script", "href", "url(", "var(", "<style", "class=", "NaN", "Inf", "<image"} {
			if strings.Contains(svg, banned) {
				t.Errorf("the lattice of %d has %s", n, banned)
			}
		}
		if !strings.Contains(svg, `fill="#ffffff"/>`) || !strings.Contains(svg, "<title") || !strings.Contains(svg, "<desc") {
			t.Errorf("the lattice of %d lacks its background, title or description", n)
		}
	}
	id := regexp.MustCompile(`id="([^"]*)"`)
	a, b := id.FindString(divisorLattice(12).SVG()), id.FindString(divisorLattice(30).SVG())
	if a == b || a == "" {
		t.Errorf("two figures share the id %s", a)
	}
}

func TestFigureInHTML(t *testing.T) {
	d := divisorLattice(12)
	html := d.HTML()
	_, rest, ok := strings.Cut(html, "base64,")
	data, rest, _ := strings.Cut(rest, `"`)
	svg, err := base64.StdEncoding.DecodeString(data)
	if !ok || err != nil || string(svg) != d.SVG() {
		t.Errorf("the image is not the figure: %v", err)
	}
	if !strings.Contains(rest, `alt="Subfields of F_{2^12} level 3:`) || !strings.Contains(rest, "<figcaption>") {
		t.Errorf("no text or caption: %s", rest)
	}
}

// The cross-reference table of a PDF points at its objects (ISO 32000-1:2008,
// Document management: Portable document format, section 7.5.4).
func TestPDF(t *testing.T) {
	for _, d := range []Diagram{
		divisorLattice(60), divisorLattice(1),
		{Title: "𝔽 and 漢字", Nodes: []Node{{ID: "a", Label: "𝔽_{2^12}", Sub: "ζ ↦ 漢 😀"}}},
	} {
		pdf, err := d.PDF()
		if err != nil {
			t.Fatal(err)
		}
		if !bytes.HasPrefix(pdf, []byte("%PDF-1.")) || !bytes.HasSuffix(bytes.TrimSpace(pdf), []byte("%%EOF")) {
			t.Fatal("not a PDF")
		}
		m := regexp.MustCompile(`startxref\n(\d+)\n`).FindSubmatch(pdf)
		if m == nil {
			t.Fatal("no startxref")
		}
		at, _ := strconv.Atoi(string(m[1]))
		if !bytes.HasPrefix(pdf[at:], []byte("xref\n")) {
			t.Fatalf("no cross-reference table at %d", at)
		}
		entries := regexp.MustCompile(`(?m)^(\d{10}) 00000 n`).FindAllSubmatch(pdf[at:], -1)
		if len(entries) < 5 {
			t.Fatalf("only %d objects", len(entries))
		}
		for i, e := range entries {
			offset, _ := strconv.Atoi(string(e[1]))
			if want := strconv.Itoa(i+1) + " 0 obj"; !bytes.HasPrefix(pdf[offset:], []byte(want)) {
				t.Errorf("object %d is not at %d", i+1, offset)
			}
		}
	}
}

func TestPrintable(t *testing.T) {
	if got := printable(run{text: "𝔽 ζ 2 😀"}); got != "F ζ 2 [U+1F600]" {
		t.Errorf("got %q", got)
	}
}

// Edges that make no sense are left out, turned ones turned, and equal ranks
// with gaps between them are levels.
func TestLayered(t *testing.T) {
	d := Diagram{
		Nodes: []Node{{ID: "a", Rank: -5}, {ID: "b", Rank: 100}, {ID: "c", Rank: 100}},
		Edges: []Edge{{"a", "b", "1"}, {"c", "a", "2"}, {"b", "c", "3"}, {"a", "?", "4"}, {"a", "a", "5"}},
	}
	l := d.layered()
	if l.levels != 2 || len(l.edges) != 2 || l.edges[0] != (link{0, 1, "1"}) || l.edges[1] != (link{0, 2, "2"}) {
		t.Errorf("got %+v", l)
	}
}

// Beyond what a page holds there is the outline alone.
func TestHugeDiagram(t *testing.T) {
	var d Diagram
	for i := range mostNodes + 1 {
		d.Nodes = append(d.Nodes, Node{ID: strconv.Itoa(i), Label: "x"})
	}
	if b := d.Bundle(); len(b.Data) != 1 || b.Data[MIMEText] == "" {
		t.Errorf("%d forms of a diagram of %d nodes", len(b.Data), len(d.Nodes))
	}
}

func BenchmarkLattice60(b *testing.B)   { benchmarkLattice(b, 60) }
func BenchmarkLattice720(b *testing.B)  { benchmarkLattice(b, 720) }
func BenchmarkLattice5040(b *testing.B) { benchmarkLattice(b, 5040) }

func benchmarkLattice(b *testing.B, n int) {
	d := divisorLattice(n)
	for b.Loop() {
		d.Bundle()
	}
}
