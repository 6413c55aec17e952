package main

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"os"
	"os/signal"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"adjoin/kernel/notebook"
)

// runner is what the flags of run say.
type runner struct {
	to      string
	html    bool
	inPlace bool
	going   bool
	json    bool
	quiet   bool
	budget  budget
}

func runCommand() *cobra.Command {
	var r runner
	c := &cobra.Command{
		Use:   "run FILE...",
		Short: "Run notebooks or scripts and write them with their outputs",
		Long: `Runs each notebook (.ipynb) or script (.adj) in a kernel of its own and writes
the executed notebook beside it: NAME-run.ipynb, for the file NAME.ipynb or
NAME.adj. After a cell that fails the others are not run.

In a script, blank lines part the cells, and a paragraph of comments alone
becomes text. The file - is a script on standard input.

Exit status: 0 when all cells ran, 1 when one failed, 2 for a wrong command line.`,
		Example: `  adjoin run notebook.ipynb
  adjoin run --html --to out/ one.ipynb two.ipynb
  adjoin run --to - script.adj > notebook.ipynb`,
		Args: someArgs("a file to run"),
		RunE: func(c *cobra.Command, files []string) error {
			return r.run(streams{c.InOrStdin(), c.OutOrStdout(), c.ErrOrStderr()}, files)
		},
	}
	f := c.Flags()
	f.StringVar(&r.to, "to", "", "write the notebook to this `file` or folder, or with - to standard output")
	f.BoolVar(&r.html, "html", false, "write a page NAME.html as well, which needs no network")
	f.BoolVar(&r.inPlace, "in-place", false, "write the notebook over the one that was run")
	f.BoolVar(&r.going, "keep-going", false, "run the cells after one that fails, too")
	f.BoolVar(&r.json, "json", false, "report what became of each cell on standard output, as JSON")
	f.BoolVarP(&r.quiet, "quiet", "q", false, "no line for each cell")
	r.budget.flags(f)
	c.MarkFlagsMutuallyExclusive("to", "in-place")
	return c
}

// report is what became of one file.
type report struct {
	File     string       `json:"file"`
	Notebook string       `json:"notebook,omitempty"`
	Page     string       `json:"page,omitempty"`
	Failed   int          `json:"failed"`
	Cells    []cellReport `json:"cells"`
}

type cellReport struct {
	ID      string `json:"id,omitempty"`
	Number  int    `json:"number"` // among the code cells, from 1
	Outcome string `json:"outcome"`
	Error   string `json:"error,omitempty"`
}

var outcomes = map[notebook.Outcome]string{
	notebook.Ran: "ok", notebook.Failed: "failed", notebook.FailedAsMeant: "failed as meant", notebook.Skipped: "not run",
}

// streams are the standard ones.
type streams struct {
	in       io.Reader
	out, err io.Writer
}

func (r *runner) run(std streams, files []string) error {
	if r.to != "" && len(files) > 1 && !isFolder(r.to) {
		return usageError{errors.New("--to must be a folder when several files are run (a new one ends in /)")}
	}
	if r.to == "-" && (r.html || r.json) {
		return usageError{errors.New("--to - leaves standard output to the notebook, and so does not go with --html or --json")}
	}
	reports := []*report{}
	bad := false
	for _, f := range files {
		rep, err := r.file(std, f)
		if err != nil {
			fmt.Fprintf(std.err, "adjoin: %s: %v\n", f, err)
			bad = true
			continue
		}
		bad = bad || rep.Failed > 0
		reports = append(reports, rep)
	}
	if r.json {
		if err := writeJSON(std.out, reports); err != nil {
			return err
		}
	}
	if bad {
		return failed{}
	}
	return nil
}

func writeJSON(w io.Writer, v any) error {
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(v)
}

// file runs one file.
func (r *runner) file(std streams, name string) (*report, error) {
	h, err := newHost(r.budget.options())
	if err != nil {
		return nil, err
	}
	defer h.close()
	ctx := context.Background()
	n, err := load(ctx, h, std.in, name)
	if err != nil {
		return nil, err
	}
	stop := interrupts(h)
	defer stop()
	rep := &report{File: name}
	run := notebook.Runner{Client: h.client, KeepGoing: r.going, Progress: func(i, total int, c *notebook.Cell, o notebook.Outcome) {
		rep.Cells = append(rep.Cells, cellReport{c.ID, i, outcomes[o], reason(c)})
		if !r.quiet {
			progress(std.err, name, i, total, c, o)
		}
	}}
	if rep.Failed, err = run.Run(ctx, n); err != nil {
		return nil, err
	}
	return rep, r.write(std.out, n, rep)
}

// interrupts lets Ctrl-C interrupt the cell that runs.
func interrupts(h *host) (stop func()) {
	c := make(chan os.Signal, 1)
	signal.Notify(c, os.Interrupt)
	go func() {
		for range c {
			h.server.Interrupt()
		}
	}()
	return func() { signal.Stop(c); close(c) }
}

// load reads a notebook or a script.
func load(ctx context.Context, h *host, stdin io.Reader, name string) (*notebook.Notebook, error) {
	if name == "-" {
		b, err := io.ReadAll(stdin)
		return notebook.FromScript(string(b), notebook.CompleteIn(ctx, h.client)), err
	}
	b, err := os.ReadFile(name)
	if err != nil {
		return nil, err
	}
	switch strings.ToLower(filepath.Ext(name)) {
	case ".ipynb":
		return notebook.Read(b)
	case ".adj":
		return notebook.FromScript(string(b), notebook.CompleteIn(ctx, h.client)), nil
	}
	return nil, errors.New("neither a notebook (.ipynb) nor a script (.adj)")
}

func progress(w io.Writer, name string, i, total int, c *notebook.Cell, o notebook.Outcome) {
	colour := map[notebook.Outcome]string{notebook.Ran: green, notebook.FailedAsMeant: green, notebook.Failed: red, notebook.Skipped: yellow}[o]
	first, _, more := strings.Cut(strings.TrimSpace(c.Source), "\n")
	if line := []rune(first); len(line) > 60 {
		first, more = string(line[:60]), true
	}
	if more {
		first += " ..."
	}
	fmt.Fprintf(w, "%s [%*d/%d] %s  %s\n", name, len(fmt.Sprint(total)), i, total, paint(w, colour, outcomes[o]), first)
	if o == notebook.Failed {
		for line := range strings.Lines(notebook.Traceback(c) + "\n") {
			fmt.Fprint(w, "    ", line)
		}
	}
}

// reason is why the cell failed, in one line.
func reason(c *notebook.Cell) string {
	for _, o := range c.Outputs {
		if o.Kind() == "error" {
			s, _ := o["evalue"].(string)
			return s
		}
	}
	return ""
}

// write writes what the flags ask for.
func (r *runner) write(stdout io.Writer, n *notebook.Notebook, rep *report) error {
	b, err := n.Write()
	if err != nil {
		return err
	}
	for i, c := range n.CodeCells() {
		rep.Cells[i].ID = c.ID
	}
	if r.to == "-" {
		_, err := stdout.Write(b)
		return err
	}
	base := strings.TrimSuffix(rep.File, filepath.Ext(rep.File))
	if rep.File == "-" {
		base = "script"
	}
	rep.Notebook, rep.Page = base+"-run.ipynb", base+".html"
	switch {
	case isFolder(r.to):
		if err := os.MkdirAll(r.to, 0o755); err != nil {
			return err
		}
		rep.Notebook = filepath.Join(r.to, filepath.Base(base)+".ipynb")
		rep.Page = filepath.Join(r.to, filepath.Base(base)+".html")
	case r.to != "":
		rep.Notebook = r.to
		rep.Page = strings.TrimSuffix(r.to, filepath.Ext(r.to)) + ".html"
	case r.inPlace:
		rep.Notebook = base + ".ipynb"
	}
	if err := writeFile(rep.Notebook, b); err != nil {
		return err
	}
	if !r.html {
		rep.Page = ""
		return nil
	}
	page, err := n.Page(filepath.Base(base), filepath.Dir(rep.File))
	if err != nil {
		return err
	}
	return writeFile(rep.Page, page)
}

func isFolder(path string) bool {
	info, err := os.Stat(path)
	return path != "" && (strings.HasSuffix(path, "/") || strings.HasSuffix(path, string(filepath.Separator)) || err == nil && info.IsDir())
}

// writeFile writes in one step: nobody ever reads half a file.
func writeFile(path string, b []byte) error {
	t, err := os.CreateTemp(filepath.Dir(path), ".adjoin-*")
	if err != nil {
		return err
	}
	defer os.Remove(t.Name())
	_, err = t.Write(b)
	if err := errors.Join(err, t.Chmod(0o644), t.Close()); err != nil {
		return err
	}
	return os.Rename(t.Name(), path)
}
