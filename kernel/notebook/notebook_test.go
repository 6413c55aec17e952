package notebook

import (
	"bytes"
	"encoding/json"
	"strings"
	"testing"

	"adjoin/kernel/client"
	"adjoin/kernel/wire"
)

const sample = `{
 "cells": [
  {"cell_type": "markdown", "metadata": {}, "source": ["# Title\n", "text"], "attachments": {"p.png": {"image/png": "AAAA"}}},
  {"cell_type": "code", "execution_count": 7, "metadata": {"tags": ["raises-exception"], "execution": {"x": "time"}, "mine": {"b": 1, "a": 1.50}},
   "outputs": [{"output_type": "stream", "name": "stdout", "text": "old\n"}], "source": "a <- b & c"},
  {"cell_type": "raw", "id": "kept-id", "metadata": {}, "source": []}
 ],
 "metadata": {"z": 1, "a": [12345678901234567890]},
 "nbformat": 4, "nbformat_minor": 2, "extra": true
}`

func read(t *testing.T, s string) *Notebook {
	t.Helper()
	n, err := Read([]byte(s))
	if err != nil {
		t.Fatal(err)
	}
	return n
}

func write(t *testing.T, n *Notebook) string {
	t.Helper()
	b, err := n.Write()
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

// Source: "The Jupyter Notebook Format", nbformat documentation 5.10, sections
// "Top-level structure" and "Cell types": keys, and texts as lists of lines.
func TestWrite(t *testing.T) {
	want := `{
 "cells": [
  {
   "attachments": {
    "p.png": {
     "image/png": "AAAA"
    }
   },
   "cell_type": "markdown",
   "id": "ID0",
   "metadata": {},
   "source": [
    "# Title\n",
    "text"
   ]
  },
  {
   "cell_type": "code",
   "execution_count": 7,
   "id": "ID1",
   "metadata": {
    "execution": {
     "x": "time"
    },
    "mine": {
     "a": 1.50,
     "b": 1
    },
    "tags": [
     "raises-exception"
    ]
   },
   "outputs": [
    {
     "name": "stdout",
     "output_type": "stream",
     "text": "old\n"
    }
   ],
   "source": [
    "a <- b & c"
   ]
  },
  {
   "cell_type": "raw",
   "id": "kept-id",
   "metadata": {},
   "source": []
  }
 ],
 "extra": true,
 "metadata": {
  "a": [
   12345678901234567890
  ],
  "z": 1
 },
 "nbformat": 4,
 "nbformat_minor": 5
}
`
	n := read(t, sample)
	got := write(t, n)
	for i, c := range n.Cells[:2] {
		if !validID.MatchString(c.ID) {
			t.Errorf("id %q", c.ID)
		}
		want = strings.Replace(want, "ID"+string(rune('0'+i)), c.ID, 1)
	}
	if got != want {
		t.Errorf("%s", got)
	}
	if again := write(t, read(t, got)); again != got {
		t.Errorf("read and written again it is %s", again)
	}
	if same := write(t, read(t, sample)); same != got {
		t.Error("the second time it is another")
	}
}

func TestEqualIDsAreParted(t *testing.T) {
	n := read(t, `{"cells":[{"cell_type":"code","id":"x","source":"1"},{"cell_type":"code","id":"x","source":"1"},{"cell_type":"code","id":"no good!","source":"1"}],"nbformat":4}`)
	write(t, n)
	if n.Cells[0].ID != "x" || n.Cells[1].ID == "x" || n.Cells[2].ID == "no good!" || n.Cells[1].ID == n.Cells[2].ID {
		t.Errorf("%s %s %s", n.Cells[0].ID, n.Cells[1].ID, n.Cells[2].ID)
	}
}

func TestReadRefuses(t *testing.T) {
	for _, s := range []string{"", "[]", "{}", `{"nbformat":3,"cells":[]}`, `{"nbformat":4}`, `{"nbformat":4,"cells":[1]}`, "\xff"} {
		if _, err := Read([]byte(s)); err == nil {
			t.Errorf("%q is accepted", s)
		}
	}
}

func FuzzRead(f *testing.F) {
	f.Add([]byte(sample))
	f.Add([]byte(`{"nbformat":4,"cells":[{"source":[1,null],"metadata":3,"outputs":[2,{"data":[]}]}],"metadata":[]}`))
	f.Fuzz(func(t *testing.T, b []byte) {
		n, err := Read(b)
		if err != nil {
			return
		}
		out, err := n.Write()
		if err != nil {
			t.Fatal(err)
		}
		if !json.Valid(out) {
			t.Fatalf("%s", out)
		}
		if _, err := n.Page("t", ""); err != nil {
			t.Fatal(err)
		}
	})
}

func broadcast(t *testing.T, kind string, content any) client.Arrival {
	t.Helper()
	b, err := wire.Marshal(content)
	if err != nil {
		t.Fatal(err)
	}
	return client.Arrival{Message: &wire.Message{Header: wire.Header{Type: kind}, Content: b}, Broadcast: true}
}

func collect(t *testing.T, all ...client.Arrival) string {
	t.Helper()
	var c collector
	for _, a := range all {
		if err := c.see(a); err != nil {
			t.Fatal(err)
		}
	}
	b, err := json.Marshal(c.outputs)
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

func TestOutputs(t *testing.T) {
	out := func(s string) client.Arrival { return broadcast(t, "stream", wire.Stream{Name: "stdout", Text: s}) }
	show := func(s string) client.Arrival {
		return broadcast(t, "display_data", wire.DisplayData{Data: map[string]any{"text/plain": s, "image/png": "A\nB", "application/vnd.x+json": map[string]any{"a": 1}}})
	}
	shown := func(s string) string {
		return `{"data":{"application/vnd.x+json":{"a":1},"image/png":"A\nB","text/plain":["` + s + `"]},"metadata":{},"output_type":"display_data"}`
	}
	for name, c := range map[string]struct {
		in   []client.Arrival
		want string
	}{
		"pieces of text": {[]client.Arrival{out("a"), out("b\nc"), out("d\n")}, `[{"name":"stdout","output_type":"stream","text":["ab\n","cd\n"]}]`},
		"streams": {[]client.Arrival{out("a\n"), broadcast(t, "stream", wire.Stream{Name: "stderr", Text: "w\n"}), out("b\n")},
			`[{"name":"stdout","output_type":"stream","text":["a\n"]},{"name":"stderr","output_type":"stream","text":["w\n"]},{"name":"stdout","output_type":"stream","text":["b\n"]}]`},
		"a value":         {[]client.Arrival{show("x")}, "[" + shown("x") + "]"},
		"cleared at once": {[]client.Arrival{out("a"), broadcast(t, "clear_output", wire.ClearOutput{})}, "null"},
		"cleared later":   {[]client.Arrival{out("a"), broadcast(t, "clear_output", wire.ClearOutput{Wait: true}), show("x")}, "[" + shown("x") + "]"},
		"never cleared":   {[]client.Arrival{out("a"), broadcast(t, "clear_output", wire.ClearOutput{Wait: true})}, `[{"name":"stdout","output_type":"stream","text":["a"]}]`},
		"an error": {[]client.Arrival{broadcast(t, "error", wire.Error{Name: "N", Value: "v", Traceback: []string{"l"}})},
			`[{"ename":"N","evalue":"v","output_type":"error","traceback":["l"]}]`},
		"a status": {[]client.Arrival{broadcast(t, "status", wire.KernelStatus{State: "busy"})}, "null"},
	} {
		if got := collect(t, c.in...); got != c.want {
			t.Errorf("%s: %s", name, got)
		}
	}
}

func TestScript(t *testing.T) {
	src := "# A title\n# and text\n\nlet a = 1\na\n\n\n[1,\n\n2]\r\n\n#comment\nb\n"
	open := func(code string) bool { return strings.Count(code, "[") == strings.Count(code, "]") }
	n := FromScript(src, open)
	var got []string
	for _, c := range n.Cells {
		got = append(got, c.Kind+":"+strings.ReplaceAll(c.Source, "\n", "|"))
	}
	if s := strings.Join(got, " "); s != "markdown:A title|and text code:let a = 1|a code:[1,||2] code:#comment|b" {
		t.Error(s)
	}
	if n := FromScript("[", open); len(n.Cells) != 1 {
		t.Error("what is never closed is lost")
	}
}

func TestMathML(t *testing.T) {
	for tex, want := range map[string]string{
		`x^{2}+1`:               `<msup><mi>x</mi><mrow><mrow><mn>2</mn></mrow></mrow></msup><mo>+</mo><mn>1</mn>`,
		`a_1^2`:                 `<msubsup><mi>a</mi><mn>1</mn><mrow><mn>2</mn></mrow></msubsup>`,
		`\mathbb{F}_{8}`:        `<msub><mi>𝔽</mi><mrow><mn>8</mn></mrow></msub>`,
		`\mathbb Q`:             `<mi>ℚ</mi>`,
		`\frac{1}{\alpha}`:      `<mfrac><mrow><mn>1</mn></mrow><mrow><mi>α</mi></mrow></mfrac>`,
		`\sqrt[3]{2}`:           `<mroot><mrow><mn>2</mn></mrow><mrow><mn>3</mn></mrow></mroot>`,
		`f'`:                    `<msup><mi>f</mi><mrow><mo>′</mo></mrow></msup>`,
		`a<b`:                   `<mi>a</mi><mo>&lt;</mo><mi>b</mi>`,
		`\operatorname{Gal}(L)`: `<mi mathvariant="normal">Gal</mi><mo stretchy="false">(</mo><mi>L</mi><mo stretchy="false">)</mo>`,
		`\begin{pmatrix}1 & 2\\ 3 & 4\\\end{pmatrix}`: `<mo>(</mo><mtable><mtr><mtd><mn>1</mn></mtd><mtd><mn>2</mn></mtd></mtr><mtr><mtd><mn>3</mn></mtd><mtd><mn>4</mn></mtd></mtr></mtable><mo>)</mo>`,
		`\left\{a\right.`: `<mo stretchy="true">{</mo><mi>a</mi>`,
	} {
		got, ok := MathML(tex, false)
		if want = "<math><mrow>" + want + "</mrow></math>"; !ok || got != want {
			t.Errorf("%s: %s, want %s", tex, got, want)
		}
	}
	for _, tex := range []string{`\unheard`, `{`, `}`, `x^`, `\frac{1}`, `\begin{pmatrix}1`, `\begin{x}\end{x}`, `\text{a`, `\`, `\left`, `&`, `$`, strings.Repeat("{", 100_000), strings.Repeat(`\sqrt`, 100_000)} {
		if got, ok := MathML(tex, false); ok {
			t.Errorf("%.20s: %.200s", tex, got)
		}
	}
}

func FuzzMathML(f *testing.F) {
	f.Add(`\frac{a_1}{b^{2}} \begin{array}{cc} 1 & 2 \\ 3 & 4 \end{array} \left( x \right)'`)
	f.Fuzz(func(t *testing.T, tex string) {
		got, ok := MathML(tex, true)
		if !ok {
			return
		}
		if bytes.ContainsAny([]byte(strings.NewReplacer("<math", "", "<m", "", "</m", "", `"`, "").Replace(got)), "<") {
			t.Errorf("%q lets through %q", tex, got)
		}
	})
}

func page(t *testing.T, cells ...*Cell) string {
	t.Helper()
	b, err := (&Notebook{Cells: cells, Metadata: map[string]any{}}).Page("name", t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

func TestPage(t *testing.T) {
	shown := func(forms map[string]any) *Cell {
		return &Cell{Kind: "code", Source: "a < b", Outputs: []Output{{"output_type": "execute_result", "data": forms}}}
	}
	for name, c := range map[string]struct {
		cell *Cell
		want string
	}{
		"code":         {shown(nil), "<code>a &lt; b</code>"},
		"a table":      {shown(map[string]any{"text/html": []string{"<table title=\"\\(x\\)\"><td>\\(x^2\\)</td></table>"}, "text/plain": "no"}), "<table title=\"\\(x\\)\"><td><math><mrow><msup><mi>x</mi><mrow><mn>2</mn></mrow></msup></mrow></math></td></table>"},
		"a formula":    {shown(map[string]any{"text/latex": "$x$", "text/plain": "no"}), "<math><mrow><mi>x</mi></mrow></math>"},
		"odd TeX":      {shown(map[string]any{"text/latex": `$\odd$`, "text/plain": "x<y"}), "<pre>x&lt;y</pre>"},
		"a drawing":    {shown(map[string]any{"image/svg+xml": "<svg/>", "text/plain": `"q"`}), `<img src="data:image/svg+xml;base64,PHN2Zy8+" alt="&#34;q&#34;">`},
		"plain text":   {shown(map[string]any{"text/plain": []any{"a\n", "b"}}), "<pre>a\nb</pre>"},
		"an error":     {&Cell{Kind: "code", Outputs: []Output{{"output_type": "error", "traceback": []any{"\x1b[31mred\x1b[0m", "<x>"}}}}, "<pre>red\n&lt;x&gt;</pre>"},
		"a heading":    {&Cell{Kind: "markdown", Source: "# A title"}, "<title>A title</title>"},
		"no heading":   {&Cell{Kind: "markdown", Source: "text"}, "<title>name</title>"},
		"maths":        {&Cell{Kind: "markdown", Source: "let $a_1 * b_1$ be, `$x$` and $\\odd{}$"}, "let <math><mrow><msub><mi>a</mi><mn>1</mn></msub><mo>∗</mo><msub><mi>b</mi><mn>1</mn></msub></mrow></math> be, <code>$x$</code> and <code>\\odd{}</code>"},
		"money":        {&Cell{Kind: "markdown", Source: "5 $ and 6 $ more"}, "5 $ and 6 $ more"},
		"maths, lines": {&Cell{Kind: "markdown", Source: "$$\nx\n$$"}, `<math display="block"><mrow><mi>x</mi></mrow></math>`},
		"attached":     {&Cell{Kind: "markdown", Source: "![p](attachment:p.png)", rest: map[string]any{"attachments": map[string]any{"p.png": map[string]any{"image/png": "AAAA"}}}}, `<img src="data:image/png;base64,AAAA" alt="p"`},
	} {
		if got := page(t, c.cell); !strings.Contains(got, c.want) {
			t.Errorf("%s: %s", name, got[strings.Index(got, "<main>"):])
		}
	}
}

func TestPageFetchesNothing(t *testing.T) {
	got := page(t, &Cell{Kind: "markdown", Source: "<script src=\"https://x.example/a.js\"></script> <img src=https://x.example/b>\n\n![c](https://x.example/c.png)\n\n![d](../../etc/passwd.png)"})
	for _, bad := range []string{"<script", "<img", "src="} {
		if strings.Contains(got, bad) {
			t.Errorf("%s is in %s", bad, got[strings.Index(got, "<main>"):])
		}
	}
	if !strings.Contains(got, "default-src 'none'") {
		t.Error("the page may fetch")
	}
}
