package main

import (
	"context"
	"encoding/base64"
	"errors"
	"fmt"
	"io"
	"os"
	"os/signal"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"adjoin/eval"
	"adjoin/eval/display"
)

func evalCommand() *cobra.Command {
	var as string
	var asJSON bool
	var b budget
	c := &cobra.Command{
		Use:   "eval [TEXT]",
		Short: "Evaluate statements and print what they show",
		Long: `Evaluates TEXT, or with - what stands on standard input, and prints every value
that it shows. Without TEXT and on a terminal it is a session: statements are
typed line by line, Tab completes, the arrow keys recall earlier lines, Ctrl-C
interrupts, and Ctrl-D ends it.

Exit status: 0, 1 when the evaluation fails, 2 for a wrong command line.`,
		Example: `  adjoin eval 'factorization of x^15 - 1 over F_2'
  adjoin eval --as latex 'minimal polynomial of g_16 over F_4'
  echo 'order of g_256' | adjoin eval -`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) > 1 {
				return usageError{errors.New("TEXT is one argument: put it into quotes")}
			}
			return nil
		},
		RunE: func(c *cobra.Command, args []string) error {
			mime, err := mimeType(as)
			if err != nil {
				return err
			}
			s := eval.NewSession(b.options())
			out := &printer{out: c.OutOrStdout(), err: c.ErrOrStderr(), mime: mime, json: asJSON}
			switch {
			case len(args) == 0 && !asJSON && isTerminal(c.InOrStdin()) && isTerminal(c.OutOrStdout()):
				return converse(s, out)
			case len(args) == 0 || args[0] == "-":
				text, err := io.ReadAll(c.InOrStdin())
				if err != nil {
					return err
				}
				args = []string{string(text)}
			}
			return out.evaluate(s, args[0])
		},
	}
	c.SetFlagErrorFunc(func(_ *cobra.Command, err error) error {
		return usageError{fmt.Errorf("%w; a TEXT that begins with - stands behind --, as in adjoin eval -- '-x^2'", err)}
	})
	c.Flags().StringVar(&as, "as", "plain", "`form` to print: plain, latex, html, svg, pdf, data, or a MIME type")
	c.Flags().BoolVar(&asJSON, "json", false, "print all forms of all values as one JSON object")
	b.flags(c.Flags())
	c.MarkFlagsMutuallyExclusive("as", "json")
	return c
}

// forms are the short names of MIME types.
var forms = map[string]string{
	"plain": "text/plain",
	"latex": "text/latex",
	"html":  "text/html",
	"svg":   "image/svg+xml",
	"pdf":   "application/pdf",
	"data":  "application/vnd.adjoin.v1+json",
}

func mimeType(form string) (string, error) {
	if m := forms[strings.ToLower(form)]; m != "" {
		return m, nil
	}
	if strings.Contains(form, "/") {
		return form, nil
	}
	return "", usageError{fmt.Errorf("the form %q is not known; there are plain, latex, html, svg, pdf and data", form)}
}

// printer prints what a cell shows.
type printer struct {
	out, err io.Writer
	mime     string
	json     bool

	shown   []shown
	missing error // a value that has not the form asked for
}

// shown is a value or a text, for --json.
type shown struct {
	Kind     string         `json:"kind"` // display, result, page, stdout or stderr
	Data     map[string]any `json:"data,omitempty"`
	Metadata map[string]any `json:"metadata,omitempty"`
	Text     string         `json:"text,omitempty"`
}

// evaluate runs a text and prints it all.
func (p *printer) evaluate(s *eval.Session, text string) error {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt)
	defer stop()
	p.shown, p.missing = nil, nil
	err := s.Execute(ctx, text, p)
	if p.json {
		return p.report(err)
	}
	if err != nil {
		first, rest, _ := strings.Cut(err.Text(), "\n")
		fmt.Fprintln(p.err, paint(p.err, red, first))
		if rest != "" {
			fmt.Fprintln(p.err, rest)
		}
		return failed{}
	}
	return p.missing
}

// report is the whole outcome as JSON.
func (p *printer) report(err *eval.Error) error {
	type fault struct {
		Name   string `json:"name"`
		Line   int    `json:"line"`
		Column int    `json:"column"`
		Reason string `json:"reason"`
		Remedy string `json:"remedy,omitempty"`
	}
	r := struct {
		Shown []shown `json:"shown"`
		Error *fault  `json:"error,omitempty"`
	}{Shown: p.shown}
	if r.Shown == nil {
		r.Shown = []shown{}
	}
	if err != nil {
		r.Error = &fault{err.Name, err.Line, err.Column, err.Reason, err.Remedy}
	}
	if e := writeJSON(p.out, r); e != nil {
		return e
	}
	if err != nil {
		return failed{}
	}
	return nil
}

func (p *printer) show(kind string, b display.Bundle) {
	if p.json {
		p.shown = append(p.shown, shown{Kind: kind, Data: b.Data, Metadata: b.Metadata})
		return
	}
	v, ok := b.Data[p.mime]
	if !ok {
		if p.missing == nil {
			p.missing = fmt.Errorf("a value has no form %s; it has %s", p.mime, strings.Join(sortedKeys(b.Data), ", "))
		}
		return
	}
	switch v := v.(type) {
	case string:
		fmt.Fprint(p.out, strings.TrimSuffix(v, "\n"), "\n")
	case []byte:
		if isTerminal(p.out) {
			fmt.Fprintln(p.out, base64.StdEncoding.EncodeToString(v))
			return
		}
		_, _ = p.out.Write(v)
	default:
		_ = writeJSON(p.out, v)
	}
}

func sortedKeys(m map[string]any) []string {
	var keys []string
	for k := range m {
		keys = append(keys, k)
	}
	slices.Sort(keys)
	return keys
}

func (p *printer) text(kind, s string, w io.Writer) {
	if p.json {
		p.shown = append(p.shown, shown{Kind: kind, Text: s})
		return
	}
	fmt.Fprint(w, s)
}

// The methods of eval.Sink.

func (p *printer) Say(s string)             { p.text("stdout", s, p.out) }
func (p *printer) Warn(s string)            { p.text("stderr", s, p.err) }
func (p *printer) Display(b display.Bundle) { p.show("display", b) }
func (p *printer) Result(b display.Bundle)  { p.show("result", b) }
func (p *printer) Clear(bool)               {}

// Page is text for reading, whatever form values are wanted in.
func (p *printer) Page(b display.Bundle) {
	if !p.json {
		b = display.Bundle{Data: map[string]any{p.mime: b.Data["text/plain"]}}
	}
	p.show("page", b)
}
