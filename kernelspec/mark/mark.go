package mark

import (
	"bytes"
	"fmt"
	"image"
	"image/color"
	"image/png"
	"strings"
)

// The mark is drawn on a square of this many units.
const unit = 64

type point struct{ x, y int }

// The nodes of the lattice, and the strokes of the root sign.
var (
	nodes = []point{{32, 8}, {56, 32}, {32, 56}, {8, 32}}
	root  = []point{{20, 33}, {24, 31}, {29, 41}, {34, 23}, {45, 23}}

	paper = color.NRGBA{0xff, 0xff, 0xff, 0xff}
	line  = color.NRGBA{0x5b, 0x6b, 0x7f, 0xff}
	node  = color.NRGBA{0x1f, 0x4e, 0x79, 0xff}
	sign  = color.NRGBA{0xb5, 0x4a, 0x1e, 0xff}
)

// Widths in tenths of a unit.
const (
	lineWidth = 22
	signWidth = 36
	nodeSize  = 62 // radius
	corner    = 120
)

// shape is a set of points, in tenths of a unit, and its colour.
type shape struct {
	in     func(x, y int) bool
	colour color.NRGBA
}

func shapes() []shape {
	s := []shape{{rounded, paper}}
	for i, a := range nodes {
		s = append(s, shape{stroke(a, nodes[(i+1)%len(nodes)], lineWidth), line})
	}
	for i := range root[1:] {
		s = append(s, shape{stroke(root[i], root[i+1], signWidth), sign})
	}
	for _, a := range nodes {
		s = append(s, shape{stroke(a, a, 2*nodeSize), node})
	}
	return s
}

// stroke is what lies within half a width of the segment from a to b.
func stroke(a, b point, width int) func(x, y int) bool {
	ax, ay := 10*a.x, 10*a.y
	dx, dy := 10*b.x-ax, 10*b.y-ay
	length := dx*dx + dy*dy
	return func(x, y int) bool {
		px, py := x-ax, y-ay
		along := px*dx + py*dy
		switch {
		case along <= 0:
			return 4*(px*px+py*py) <= width*width
		case along >= length:
			px, py = px-dx, py-dy
			return 4*(px*px+py*py) <= width*width
		}
		across := px*dy - py*dx
		return 4*across*across <= width*width*length
	}
}

// rounded is the whole square but for its corners.
func rounded(x, y int) bool {
	far := func(v int) int { return max(corner-v, v-(10*unit-corner), 0) }
	dx, dy := far(x), far(y)
	return dx*dx+dy*dy <= corner*corner
}

// samples are taken along each side of a pixel.
const samples = 8

// PNG is the mark, size pixels wide and high.
func PNG(size int) []byte {
	img := image.NewNRGBA(image.Rect(0, 0, size, size))
	all := shapes()
	for y := range size {
		for x := range size {
			img.SetNRGBA(x, y, pixel(all, x, y, size))
		}
	}
	var b bytes.Buffer
	if err := png.Encode(&b, img); err != nil {
		panic(err) // writing to memory does not fail
	}
	return b.Bytes()
}

// pixel is the mean colour over a pixel.
func pixel(all []shape, x, y, size int) color.NRGBA {
	var r, g, b, a int
	for i := range samples {
		for j := range samples {
			// The middle of a sample, in tenths of a unit.
			px := (2*(x*samples+i) + 1) * 10 * unit / (2 * samples * size)
			py := (2*(y*samples+j) + 1) * 10 * unit / (2 * samples * size)
			for k := len(all) - 1; k >= 0; k-- {
				if all[k].in(px, py) {
					c := all[k].colour
					r, g, b, a = r+int(c.R), g+int(c.G), b+int(c.B), a+1
					break
				}
			}
		}
	}
	if a == 0 {
		return color.NRGBA{}
	}
	return color.NRGBA{uint8(r / a), uint8(g / a), uint8(b / a), uint8(255 * a / (samples * samples))}
}

// SVG is the mark as a drawing.
func SVG() []byte {
	var b strings.Builder
	path := func(p []point, end string) string {
		var d strings.Builder
		for i, q := range p {
			d.WriteString(map[bool]string{true: "M", false: " L"}[i == 0])
			fmt.Fprintf(&d, "%d %d", q.x, q.y)
		}
		return d.String() + end
	}
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 %d %d" width="%[1]d" height="%[1]d">`+"\n", unit, unit)
	fmt.Fprintf(&b, "  <title>Adjoin</title>\n")
	fmt.Fprintf(&b, `  <rect width="%d" height="%[1]d" rx="%s" fill="%s"/>`+"\n", unit, tenths(corner), hex(paper))
	fmt.Fprintf(&b, `  <path d="%s" fill="none" stroke="%s" stroke-width="%s"/>`+"\n", path(nodes, " Z"), hex(line), tenths(lineWidth))
	fmt.Fprintf(&b, `  <path d="%s" fill="none" stroke="%s" stroke-width="%s" stroke-linecap="round" stroke-linejoin="round"/>`+"\n",
		path(root, ""), hex(sign), tenths(signWidth))
	for _, n := range nodes {
		fmt.Fprintf(&b, `  <circle cx="%d" cy="%d" r="%s" fill="%s"/>`+"\n", n.x, n.y, tenths(nodeSize), hex(node))
	}
	b.WriteString("</svg>\n")
	return []byte(b.String())
}

func tenths(n int) string { return fmt.Sprintf("%d.%d", n/10, n%10) }

func hex(c color.NRGBA) string { return fmt.Sprintf("#%02x%02x%02x", c.R, c.G, c.B) }
