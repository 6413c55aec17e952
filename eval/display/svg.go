package display

import (
	"crypto/sha256"
	"encoding/base64"
	"fmt"
	"math"
	"strconv"
	"strings"
)

const fontStack = `'Liberation Serif','Times New Roman',Times,'Nimbus Roman',Tinos,'DejaVu Serif',serif`

// SVG is the figure as a document of its own (W3C, Scalable Vector Graphics
// 1.1, 2nd edition, 2011): no outside references, no scripts, its own light
// background, and ids that no other figure has.
func (d Diagram) SVG() string { return d.svg(d.draw()) }

func (d Diagram) svg(pic drawing) string {
	body := pic.svgBody()
	title, desc := oneLine(d.Title), d.Text()
	if title == "" {
		title = "Diagram"
	}
	id := fmt.Sprintf("d%x", sha256.Sum256([]byte(title+"\x00"+desc+"\x00"+body)))[:13]
	var b strings.Builder
	w, h := number(pic.width), number(pic.height)
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" version="1.1" width="%s" height="%s" viewBox="0 0 %s %s" role="img" aria-labelledby="%s-t %s-d">`+"\n", w, h, w, h, id, id)
	fmt.Fprintf(&b, "<title id=\"%s-t\">%s</title>\n<desc id=\"%s-d\">%s</desc>\n", id, escapeXML(title), id, escapeXML(desc))
	fmt.Fprintf(&b, "<rect width=\"%s\" height=\"%s\" fill=\"%s\"/>\n", w, h, background)
	b.WriteString(body)
	b.WriteString("</svg>\n")
	return b.String()
}

func (pic drawing) svgBody() string {
	var b strings.Builder
	b.WriteString("<g fill=\"none\" stroke-width=\"1.3\" stroke-linecap=\"round\" stroke-linejoin=\"round\">\n")
	for _, l := range pic.lines {
		points := make([]string, len(l.points))
		for i, p := range l.points {
			points[i] = number(p.x) + "," + number(p.y)
		}
		fmt.Fprintf(&b, "<polyline points=\"%s\" stroke=\"%s\"/>\n", strings.Join(points, " "), l.color)
	}
	fmt.Fprintf(&b, "</g>\n<g font-family=\"%s\" text-anchor=\"middle\">\n", fontStack)
	for _, m := range pic.marks {
		fmt.Fprintf(&b, "<rect x=\"%s\" y=\"%s\" width=\"%s\" height=\"%s\" fill=\"%s\"/>\n",
			number(m.center.x-m.width/2), number(m.center.y-m.height/2), number(m.width), number(m.height), background)
		svgText(&b, m.text, m.center.x, m.baseline(), markSize, m.color)
	}
	for _, x := range pic.boxes {
		fill, line, stroke := x.style()
		fmt.Fprintf(&b, "<rect x=\"%s\" y=\"%s\" width=\"%s\" height=\"%s\" rx=\"%s\" fill=\"%s\" stroke=\"%s\" stroke-width=\"%s\"/>\n",
			number(x.center.x-x.width/2), number(x.center.y-x.height/2), number(x.width), number(x.height), number(cornerSize), fill, line, number(stroke))
		label, sub := x.baselines()
		svgText(&b, x.label, x.center.x, label, labelSize, ink)
		if x.sub != nil {
			svgText(&b, x.sub, x.center.x, sub, subSize, softInk)
		}
	}
	b.WriteString("</g>\n")
	return b.String()
}

// style of a box. An emphasised one differs in the strength of its line, not
// in colour only.
func (x box) style() (fill, line string, stroke float64) {
	if x.emph {
		return emphFill, emphLine, 1.6
	}
	return boxFill, boxLine, 1
}

// baselines of the label and of the line under it.
func (x box) baselines() (label, sub float64) {
	if x.sub == nil {
		return tenth(x.center.y + labelSize*0.32), 0
	}
	return tenth(x.center.y - labelSize*0.25), tenth(x.center.y + subSize*1.24)
}

func (m mark) baseline() float64 { return tenth(m.center.y + markSize*0.33) }

// svgText writes runs about x. Scripts are moved with dy, the one way of
// raising text that all readers know, so every move is undone by the next.
func svgText(b *strings.Builder, list []run, x, y, size float64, color string) {
	fmt.Fprintf(b, "<text x=\"%s\" y=\"%s\" font-size=\"%s\" fill=\"%s\" xml:space=\"preserve\">", number(x), number(y), number(size), color)
	at := 0.0
	for _, r := range list {
		attributes := ""
		if up := r.shift() * size; up != at {
			attributes += fmt.Sprintf(" dy=\"%s\"", number(at-up))
			// What is written, not what was meant, is what has to be undone.
			at -= math.Round((at-up)*100) / 100
		}
		if r.path != "" {
			attributes += fmt.Sprintf(" font-size=\"%s\"", number(r.scale()*size))
		}
		if r.italic {
			attributes += ` font-style="italic"`
		}
		if attributes == "" {
			b.WriteString(escapeXML(r.text))
		} else {
			fmt.Fprintf(b, "<tspan%s>%s</tspan>", attributes, escapeXML(r.text))
		}
	}
	b.WriteString("</text>\n")
}

// number writes x with two decimals at most.
func number(x float64) string {
	x = math.Round(x*100) / 100
	if x == 0 {
		return "0"
	}
	return strconv.FormatFloat(x, 'f', -1, 64)
}

// HTML is the figure as an image in a figure element: the one form of a
// drawing that notebooks show also before their reader has declared them
// trusted, and the one that carries a text for those who do not see it.
func (d Diagram) HTML() string { return d.html(d.SVG()) }

func (d Diagram) html(svg string) string {
	var b strings.Builder
	fmt.Fprintf(&b, "<figure>\n<img src=\"data:image/svg+xml;base64,%s\" alt=\"%s\" style=\"max-width:100%%\">\n",
		base64.StdEncoding.EncodeToString([]byte(svg)), escapeXML(d.Text()))
	if d.Caption != "" {
		fmt.Fprintf(&b, "<figcaption>%s</figcaption>\n", proseHTML(d.Caption))
	}
	b.WriteString("</figure>")
	return b.String()
}
