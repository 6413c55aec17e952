package demos

import (
	"bytes"
	"flag"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "run the demos and keep their new outputs")

// program builds adjoin.
func program(t *testing.T) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "adjoin")
	if out, err := exec.Command("go", "build", "-o", path, "../kernel/cmd/adjoin").CombinedOutput(); err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	return path
}

// The committed notebooks are what adjoin run makes of them, byte for byte.
func TestDemos(t *testing.T) {
	adjoin := program(t)
	paths, err := filepath.Glob("*.ipynb")
	if err != nil || len(paths) == 0 {
		t.Fatalf("no demos: %v", err)
	}
	for _, path := range paths {
		if strings.HasSuffix(path, "-run.ipynb") {
			continue // left by the first command of the README
		}
		t.Run(strings.TrimSuffix(path, ".ipynb"), func(t *testing.T) {
			to := filepath.Join(t.TempDir(), path)
			if out, err := exec.Command(adjoin, "run", "--html", "--to", to, path).CombinedOutput(); err != nil {
				t.Fatalf("%v\n%s", err, out)
			}
			got, err := os.ReadFile(to)
			if err != nil {
				t.Fatal(err)
			}
			if *update {
				if err := os.WriteFile(path, got, 0o644); err != nil {
					t.Fatal(err)
				}
			}
			want, err := os.ReadFile(path)
			if err != nil {
				t.Fatal(err)
			}
			if !bytes.Equal(got, want) {
				t.Errorf("the outputs changed: look at what adjoin run makes of %s, and run this test with -update to keep it", path)
			}
			page, err := os.ReadFile(strings.TrimSuffix(to, ".ipynb") + ".html")
			if err != nil {
				t.Fatal(err)
			}
			for _, want := range []string{"<table", "data:image/svg+xml", "<math"} {
				if !bytes.Contains(page, []byte(want)) {
					t.Errorf("the page has no %s", want)
				}
			}
			for _, outside := range []string{"http://", "https://", "<script", "<link"} {
				text := strings.ReplaceAll(string(page), "http://www.w3.org/", "")
				if strings.Contains(text, outside) {
					t.Errorf("the page reaches for %s", outside)
				}
			}
		})
	}
}
