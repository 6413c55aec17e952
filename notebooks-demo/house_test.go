package demos

import (
	"encoding/json"
	"errors"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"testing"
)

// floors is the house from the top down. A package imports from its own floor
// and from those below it. The kernelspec, which only files and paths make up,
// lies at the bottom: the program installs it.
var floors = []string{"notebooks-demo", "kernel", "eval", "lang", "algebra", "kernelspec"}

// alone lists floors that import nothing of ours from other floors.
var alone = []string{"kernelspec", "lang", "algebra"}

// pkg is what the go command tells of a package.
type pkg struct {
	ImportPath, Doc, Name              string
	Imports, TestImports, XTestImports []string
	GoFiles                            []string
}

func packages(t *testing.T) []pkg {
	t.Helper()
	out, err := exec.Command("go", "list", "-json", "../...").Output()
	if err != nil {
		t.Fatal(err)
	}
	var list []pkg
	for d := json.NewDecoder(strings.NewReader(string(out))); ; {
		var p pkg
		if err := d.Decode(&p); errors.Is(err, io.EOF) {
			return list
		} else if err != nil {
			t.Fatal(err)
		}
		list = append(list, p)
	}
}

func floor(path string) (string, int) {
	name, _, _ := strings.Cut(strings.TrimPrefix(path, "adjoin/"), "/")
	return name, slices.Index(floors, name)
}

func TestImportsPointDown(t *testing.T) {
	for _, p := range packages(t) {
		from, i := floor(p.ImportPath)
		if i < 0 {
			t.Errorf("%s is on no floor", p.ImportPath)
			continue
		}
		for _, path := range p.Imports {
			if !strings.HasPrefix(path, "adjoin/") {
				continue
			}
			to, j := floor(path)
			if j < i {
				t.Errorf("%s imports %s, which is above it", p.ImportPath, path)
			}
			if from != to && slices.Contains(alone, from) {
				t.Errorf("%s imports %s, but %s stands alone", p.ImportPath, path, from)
			}
		}
		// Tests may use what exists for tests, and otherwise obey the same rule;
		// but the colouring of cells is checked against the notation itself.
		for _, path := range slices.Concat(p.TestImports, p.XTestImports) {
			if from == "kernelspec" && (path == "adjoin/lang" || path == "adjoin/eval/vocabulary") {
				continue
			}
			if _, j := floor(path); strings.HasPrefix(path, "adjoin/") && j < i {
				t.Errorf("a test of %s imports %s, which is above it", p.ImportPath, path)
			}
		}
	}
}

func TestEveryPackageSaysWhatItIs(t *testing.T) {
	for _, p := range packages(t) {
		if len(p.GoFiles) > 0 && p.Doc == "" {
			t.Errorf("%s has no package comment", p.ImportPath)
		}
	}
}

// evaluator and kernel keep to their side of the door.
func TestDoors(t *testing.T) {
	for _, p := range packages(t) {
		for _, path := range p.Imports {
			adapter := p.ImportPath == "adjoin/kernel/engine" || strings.HasPrefix(p.ImportPath, "adjoin/kernel/cmd/")
			if strings.HasPrefix(p.ImportPath, "adjoin/kernel") && !adapter &&
				(strings.HasPrefix(path, "adjoin/eval") || strings.HasPrefix(path, "adjoin/algebra/")) {
				t.Errorf("%s imports %s: only the adapter and the program know the evaluator", p.ImportPath, path)
			}
		}
	}
}

func TestTopLevel(t *testing.T) {
	allowed := []string{"kernel", "lang", "eval", "algebra", "kernelspec", "notebooks-demo",
		"go.mod", "go.sum", "README.md", "DEVELOPERS.md", "LICENSE"}
	entries, err := os.ReadDir("..")
	if err != nil {
		t.Fatal(err)
	}
	var found []string
	for _, e := range entries {
		if !strings.HasPrefix(e.Name(), ".") {
			found = append(found, e.Name())
		}
	}
	slices.Sort(allowed)
	slices.Sort(found)
	if !slices.Equal(found, allowed) {
		t.Errorf("the top level is %v, not %v", found, allowed)
	}
}

// The two commands of the README do what it says.
func TestReadmeCommands(t *testing.T) {
	text, err := os.ReadFile("../README.md")
	if err != nil {
		t.Fatal(err)
	}
	for _, command := range []string{"go test ./...", "go run ./kernel/cmd/adjoin run --html notebooks-demo/"} {
		if !strings.Contains(string(text), command) {
			t.Errorf("the README does not have the command %q", command)
		}
	}
	for line := range strings.Lines(string(text)) {
		line = strings.TrimSpace(line)
		if !strings.HasPrefix(line, "go run ./kernel/cmd/adjoin run") {
			continue
		}
		args := strings.Fields(line)[1:]
		args = append(args, "--to", filepath.Join(t.TempDir(), "out.ipynb"))
		c := exec.Command("go", args...)
		c.Dir = ".."
		if out, err := c.CombinedOutput(); err != nil {
			t.Errorf("%s: %v\n%s", line, err, out)
		}
	}
}

// What the README and DEVELOPERS.md point to is there.
func TestLinks(t *testing.T) {
	link := regexp.MustCompile(`\]\(([^)#:]+)\)`)
	for _, name := range []string{"README.md", "DEVELOPERS.md"} {
		text, err := os.ReadFile(filepath.Join("..", name))
		if err != nil {
			t.Fatal(err)
		}
		for _, found := range link.FindAllStringSubmatch(string(text), -1) {
			if _, err := os.Stat(filepath.Join("..", found[1])); err != nil {
				t.Errorf("%s points to %s: %v", name, found[1], err)
			}
		}
	}
}
