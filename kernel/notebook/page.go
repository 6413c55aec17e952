package notebook

import (
	"bytes"
	_ "embed"
	"encoding/base64"
	"html/template"
	"regexp"
	"strings"
)

//go:embed page.css
var pageCSS string

// The policy lets nothing be fetched, whatever a cell holds.
var pageTemplate = template.Must(template.New("page").Parse(`<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; img-src data:; style-src 'unsafe-inline'">
<title>{{.Title}}</title>
<style>
{{.CSS}}</style>
</head>
<body>
<main>
{{range .Cells}}{{if .Text}}<section class="text">
{{.Text}}</section>
{{else}}<section class="cell">
<pre class="code"><code>{{.Code}}</code></pre>
{{range .Outputs}}<div class="{{.Class}}">{{.HTML}}</div>
{{end}}</section>
{{end}}{{end}}</main>
</body>
</html>
`))

type pageCell struct {
	Text    template.HTML // of a text cell
	Code    string        // of a code cell
	Outputs []pageOutput
}

type pageOutput struct {
	Class string
	HTML  template.HTML
}

// Page is the notebook as a page of HTML that needs nothing but itself. Dir is
// where the pictures lie that the text names; title stands for a missing
// heading.
func (n *Notebook) Page(title, dir string) ([]byte, error) {
	var cells []pageCell
	for _, c := range n.Cells {
		switch c.Kind {
		case "markdown":
			text, err := markdown(c, dir)
			if err != nil {
				return nil, err
			}
			cells = append(cells, pageCell{Text: template.HTML(text)})
		case "code":
			p := pageCell{Code: c.Source}
			for _, o := range c.Outputs {
				p.Outputs = append(p.Outputs, pageOutputOf(o))
			}
			cells = append(cells, p)
		}
	}
	if h := n.heading(); h != "" {
		title = h
	}
	var b bytes.Buffer
	err := pageTemplate.Execute(&b, struct {
		Title string
		CSS   template.CSS
		Cells []pageCell
	}{title, template.CSS(pageCSS), cells})
	return b.Bytes(), err
}

// heading is the first heading of the notebook.
func (n *Notebook) heading() string {
	for _, c := range n.Cells {
		if c.Kind == "markdown" {
			for line := range strings.Lines(c.Source) {
				if h, ok := strings.CutPrefix(line, "# "); ok {
					return strings.TrimSpace(h)
				}
			}
		}
	}
	return ""
}

// Traceback is why the cell failed, in plain text; "" when it did not.
func Traceback(c *Cell) string {
	for _, o := range c.Outputs {
		if o.Kind() == "error" {
			return o.traceback()
		}
	}
	return ""
}

func (o Output) traceback() string {
	list, _ := o["traceback"].([]any)
	var b []string
	for _, line := range list {
		b = append(b, ansi.ReplaceAllString(joined(line), ""))
	}
	if len(b) == 0 {
		b = []string{joined(o["ename"]) + ": " + joined(o["evalue"])}
	}
	return strings.Join(b, "\n")
}

var ansi = regexp.MustCompile("\x1b\\[[0-9;]*m")

// pageOutputOf is an output in the form that reads best without help from
// anywhere: tables and figures as they are, formulas as MathML or, where that
// cannot be, as plain text.
func pageOutputOf(o Output) pageOutput {
	switch o.Kind() {
	case "stream":
		return pageOutput{"stream " + textOf(o["name"]), pre(strings.TrimSuffix(o.Text(), "\n"))}
	case "error":
		return pageOutput{"error", pre(o.traceback())}
	}
	if h := o.Form("text/html"); h != "" {
		return pageOutput{"shown", template.HTML(typesetHTML(h))}
	}
	if s := o.Form("image/svg+xml"); s != "" {
		return pageOutput{"shown", picture("image/svg+xml", base64.StdEncoding.EncodeToString([]byte(s)), o.Form("text/plain"))}
	}
	for _, mime := range []string{"image/png", "image/jpeg"} {
		if s := o.Form(mime); s != "" {
			return pageOutput{"shown", picture(mime, strings.ReplaceAll(s, "\n", ""), o.Form("text/plain"))}
		}
	}
	if math, ok := formula(o.Form("text/latex")); ok {
		return pageOutput{"shown", template.HTML(math)}
	}
	return pageOutput{"shown", pre(o.Form("text/plain"))}
}

func pre(s string) template.HTML {
	return template.HTML("<pre>" + template.HTMLEscapeString(s) + "</pre>")
}

func picture(mime, base64, alt string) template.HTML {
	return template.HTML(`<img src="data:` + mime + `;base64,` + template.HTMLEscapeString(base64) + `" alt="` + template.HTMLEscapeString(alt) + `">`)
}
