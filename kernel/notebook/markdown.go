package notebook

import (
	"bytes"
	"encoding/base64"
	"html"
	"mime"
	"os"
	"path/filepath"
	"strings"

	"github.com/yuin/goldmark"
	"github.com/yuin/goldmark/ast"
	"github.com/yuin/goldmark/extension"
	"github.com/yuin/goldmark/parser"
	"github.com/yuin/goldmark/renderer"
	"github.com/yuin/goldmark/text"
	"github.com/yuin/goldmark/util"
)

// markdown is a text cell as HTML. HTML in the cell is not let through. Dir is
// where the pictures lie that it names.
func markdown(c *Cell, dir string) (string, error) {
	md := goldmark.New(
		goldmark.WithExtensions(extension.Table, extension.Strikethrough),
		goldmark.WithParserOptions(
			parser.WithInlineParsers(util.Prioritized(mathParser{}, 150)),
			parser.WithASTTransformers(util.Prioritized(inliner{c, dir}, 100)),
		),
		goldmark.WithRendererOptions(renderer.WithNodeRenderers(util.Prioritized(mathRenderer{}, 150))),
	)
	var b bytes.Buffer
	err := md.Convert([]byte(c.Source), &b)
	return b.String(), err
}

// mathNode is a formula in a text.
type mathNode struct {
	ast.BaseInline
	tex   string
	block bool
}

var kindMath = ast.NewNodeKind("Math")

func (n *mathNode) Kind() ast.NodeKind            { return kindMath }
func (n *mathNode) Dump(source []byte, level int) { ast.DumpHelper(n, source, level, nil, nil) }

// mathParser reads $...$ and $$...$$, in which Markdown means nothing.
type mathParser struct{}

func (mathParser) Trigger() []byte { return []byte{'$'} }

func (mathParser) Parse(_ ast.Node, r text.Reader, _ parser.Context) ast.Node {
	line, start := r.Position()
	first, _ := r.PeekLine()
	mark := "$"
	if bytes.HasPrefix(first, []byte("$$")) {
		mark = "$$"
	}
	r.Advance(len(mark))
	var tex strings.Builder
	for {
		rest, _ := r.PeekLine()
		if rest == nil {
			break
		}
		if i := bytes.Index(rest, []byte(mark)); i >= 0 {
			tex.Write(rest[:i])
			r.Advance(i + len(mark))
			t := tex.String()
			if mark == "$" && strings.TrimSpace(t) != t || t == "" {
				break
			}
			return &mathNode{tex: t, block: mark == "$$"}
		}
		tex.Write(rest)
		r.AdvanceLine()
	}
	r.SetPosition(line, start)
	return nil
}

type mathRenderer struct{}

func (mathRenderer) RegisterFuncs(r renderer.NodeRendererFuncRegisterer) {
	r.Register(kindMath, func(w util.BufWriter, _ []byte, node ast.Node, entering bool) (ast.WalkStatus, error) {
		if !entering {
			return ast.WalkContinue, nil
		}
		n := node.(*mathNode)
		math, ok := MathML(n.tex, n.block)
		if !ok {
			math = "<code>" + html.EscapeString(n.tex) + "</code>"
		}
		_, err := w.WriteString(math)
		return ast.WalkContinue, err
	})
}

// inliner puts the pictures of a text into the page: attachments of the cell
// and files beside the notebook. Those elsewhere would need a network and
// become links.
type inliner struct {
	cell *Cell
	dir  string
}

func (i inliner) Transform(doc *ast.Document, _ text.Reader, _ parser.Context) {
	var pictures []*ast.Image
	_ = ast.Walk(doc, func(n ast.Node, entering bool) (ast.WalkStatus, error) {
		if p, ok := n.(*ast.Image); ok && entering {
			pictures = append(pictures, p)
		}
		return ast.WalkContinue, nil
	})
	for _, p := range pictures {
		if data := i.data(string(p.Destination)); data != "" {
			p.Destination = []byte(data)
			continue
		}
		link := ast.NewLink()
		link.Destination = p.Destination
		for c := p.FirstChild(); c != nil; {
			next := c.NextSibling()
			link.AppendChild(link, c)
			c = next
		}
		p.Parent().ReplaceChild(p.Parent(), p, link)
	}
}

// data is the picture as a data address, "" when it is not at hand.
func (i inliner) data(where string) string {
	if strings.HasPrefix(where, "data:image/") {
		return where
	}
	if name, ok := strings.CutPrefix(where, "attachment:"); ok {
		forms := object(object(i.cell.rest["attachments"])[name])
		for _, kind := range []string{"image/png", "image/jpeg", "image/gif"} {
			if s := joined(forms[kind]); s != "" {
				return "data:" + kind + ";base64," + strings.ReplaceAll(s, "\n", "")
			}
		}
		return ""
	}
	if i.dir == "" || strings.Contains(where, ":") || !filepath.IsLocal(filepath.FromSlash(where)) {
		return ""
	}
	kind := mime.TypeByExtension(filepath.Ext(where))
	if !strings.HasPrefix(kind, "image/") {
		return ""
	}
	b, err := os.ReadFile(filepath.Join(i.dir, filepath.FromSlash(where)))
	if err != nil {
		return ""
	}
	return "data:" + kind + ";base64," + base64.StdEncoding.EncodeToString(b)
}
