package eval

import (
	"bytes"
	"context"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"adjoin/eval/display"
)

var update = flag.Bool("update", false, "rewrite the expected outputs in testdata")

// recorder is a sink that writes what a cell shows as text.
type recorder struct{ bytes.Buffer }

func (r *recorder) Say(text string)          { fmt.Fprintf(r, "say: %s", text) }
func (r *recorder) Display(b display.Bundle) { r.show("", b) }
func (r *recorder) Result(b display.Bundle)  { r.show("", b) }
func (r *recorder) Page(b display.Bundle)    { r.show("page: ", b) }
func (r *recorder) Clear(wait bool)          { fmt.Fprintln(r, "clear") }
func (r *recorder) Warn(text string)         { fmt.Fprintf(r, "warning: %s", text) }

func (r *recorder) show(label string, b display.Bundle) {
	fmt.Fprintf(r, "%s%s\n", label, b.Data["text/plain"])
}

// run executes a cell and returns what it shows, and the error as a block.
func run(s *Session, src string) (string, *Error) {
	var r recorder
	err := s.Execute(context.Background(), src, &r)
	if err != nil {
		fmt.Fprintf(&r, "error %s\n%s\n", err.Name, err.Text())
	}
	return strings.TrimRight(r.String(), "\n"), err
}

// TestCells runs the cells of testdata/*.adj. A file is a notebook: a cell is
// a run of lines that do not begin with a tab, and the lines behind it that do
// are what it shows. Blank lines and comments before a cell belong to no cell.
func TestCells(t *testing.T) {
	files, err := filepath.Glob("testdata/*.adj")
	if err != nil || len(files) == 0 {
		t.Fatal("no testdata", err)
	}
	for _, file := range files {
		t.Run(strings.TrimSuffix(filepath.Base(file), ".adj"), func(t *testing.T) {
			data, err := os.ReadFile(file)
			if err != nil {
				t.Fatal(err)
			}
			got := rerun(string(data))
			if *update {
				if err := os.WriteFile(file, []byte(got), 0o644); err != nil {
					t.Fatal(err)
				}
				return
			}
			compare(t, string(data), got)
		})
	}
}

// rerun returns the text of a file of cells with its outputs made anew.
func rerun(text string) string {
	s := NewSession(Options{})
	var out strings.Builder
	lines := strings.Split(strings.TrimRight(text, "\n"), "\n")
	for i := 0; i < len(lines); {
		var cell []string
		for ; i < len(lines) && lines[i] != "" && !strings.HasPrefix(lines[i], "\t"); i++ {
			cell = append(cell, lines[i])
			fmt.Fprintln(&out, lines[i])
		}
		if len(cell) > 0 {
			shown, _ := run(s, strings.Join(cell, "\n"))
			if shown != "" {
				for _, l := range strings.Split(shown, "\n") {
					fmt.Fprintln(&out, "\t"+l)
				}
			}
		}
		for ; i < len(lines) && strings.HasPrefix(lines[i], "\t"); i++ {
		}
		if i < len(lines) && lines[i] == "" {
			fmt.Fprintln(&out)
			i++
		}
	}
	return out.String()
}

func compare(t *testing.T, want, got string) {
	w, g := strings.Split(want, "\n"), strings.Split(got, "\n")
	for i := range max(len(w), len(g)) {
		a, b := "", ""
		if i < len(w) {
			a = w[i]
		}
		if i < len(g) {
			b = g[i]
		}
		if a != b {
			t.Fatalf("line %d:\n  want %q\n  got  %q", i+1, a, b)
		}
	}
}
