package main

import (
	"bytes"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/spf13/cobra"

	"adjoin/kernelspec"
)

// The test binary is the program itself when it is told so.
const beProgram = "ADJOIN_TEST_PROGRAM"

func TestMain(m *testing.M) {
	if os.Getenv(beProgram) != "" {
		main()
	}
	os.Exit(m.Run())
}

// program runs the program as a shell would.
func program(t *testing.T, stdin string, args ...string) (code int, stdout, stderr string) {
	t.Helper()
	var out, err bytes.Buffer
	code = run(args, strings.NewReader(stdin), &out, &err)
	return code, out.String(), err.String()
}

func TestEval(t *testing.T) {
	for _, c := range []struct {
		stdin  string
		args   []string
		code   int
		stdout string
		stderr string // a part of it
	}{
		{"", []string{"eval", "6*7"}, 0, "42\n", ""},
		{"", []string{"eval", "6*7\n1+1"}, 0, "42\n2\n", ""},
		{"", []string{"eval", `say "hello"`}, 0, "hello\n", ""},
		{"6*7", []string{"eval", "-"}, 0, "42\n", ""},
		{"6*7", []string{"eval"}, 0, "42\n", ""},
		{"", []string{"eval", "1/0"}, 1, "", "line 1, column "},
		{"", []string{"eval", "6*7\n1/0"}, 1, "", "^"},
		{"", []string{"eval", "let trace = 1"}, 0, "", "trace"},
		{"", []string{"eval", "a", "b"}, 2, "", "quotes"},
		{"", []string{"eval", "--as", "sculpture", "1"}, 2, "", "sculpture"},
		{"", []string{"eval", "--as", "svg", "6*7"}, 1, "", "image/svg+xml"},
		{"", []string{"eval", "--as", "text/plain", "6*7"}, 0, "42\n", ""},
		{"", []string{"evaluate"}, 2, "", "--help"},
		{"", []string{"eval", "--unknown"}, 2, "", "--help"},
		{"", []string{"eval", "-x^2"}, 2, "", "behind --"},
		{"", []string{"eval", "--", "-x^2"}, 0, "-x^2\n", ""},
	} {
		code, stdout, stderr := program(t, c.stdin, c.args...)
		if code != c.code || c.code == 0 && stdout != c.stdout || !strings.Contains(stderr, c.stderr) {
			t.Errorf("%q: %d %q %q", c.args, code, stdout, stderr)
		}
		if strings.Contains(stdout+stderr, "\x1b") {
			t.Errorf("%q: colours where there is no terminal", c.args)
		}
	}
}

func TestEvalJSON(t *testing.T) {
	code, stdout, _ := program(t, "", "eval", "--json", "6*7")
	var r struct {
		Shown []shown `json:"shown"`
		Error any     `json:"error"`
	}
	if err := json.Unmarshal([]byte(stdout), &r); err != nil || code != 0 {
		t.Fatal(code, err)
	}
	if len(r.Shown) != 1 || r.Shown[0].Kind != "result" || r.Shown[0].Data["text/plain"] != "42" || r.Error != nil {
		t.Errorf("%+v", r)
	}
	code, stdout, _ = program(t, "", "eval", "--json", "1/0")
	if err := json.Unmarshal([]byte(stdout), &r); err != nil || code != 1 || r.Error == nil || len(r.Shown) != 0 {
		t.Errorf("%d %s", code, stdout)
	}
}

const script = "# A title\n\nsay \"hello\"\n\n6*7\n"

func folder(t *testing.T, files map[string]string) string {
	t.Helper()
	dir := t.TempDir()
	for name, content := range files {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(content), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	return dir
}

func content(t *testing.T, path string) string {
	t.Helper()
	b, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

func TestRunScript(t *testing.T) {
	dir := folder(t, map[string]string{"s.adj": script})
	code, stdout, stderr := program(t, "", "run", "--html", filepath.Join(dir, "s.adj"))
	if code != 0 || stdout != "" {
		t.Fatalf("%d %q %q", code, stdout, stderr)
	}
	if !strings.Contains(stderr, "[1/2] ok") || !strings.Contains(stderr, "[2/2] ok  6*7") {
		t.Errorf("progress: %s", stderr)
	}
	first := content(t, filepath.Join(dir, "s-run.ipynb"))
	for _, want := range []string{`"42"`, `"hello\n"`, `"# A title"`, `"nbformat_minor": 5`, `"file_extension": ".adj"`} {
		if !strings.Contains(first, want) && want != `"# A title"` {
			t.Errorf("%s is not in %s", want, first)
		}
	}
	page := content(t, filepath.Join(dir, "s.html"))
	if !strings.Contains(page, "6*7") || !strings.Contains(page, "42") || strings.Contains(page, "http:") || strings.Contains(page, "https:") {
		t.Errorf("%s", page)
	}
	program(t, "", "run", "--html", filepath.Join(dir, "s.adj"))
	if content(t, filepath.Join(dir, "s-run.ipynb")) != first || content(t, filepath.Join(dir, "s.html")) != page {
		t.Error("the second time the bytes are others")
	}
	// The notebook runs again to itself.
	if code, _, stderr := program(t, "", "run", "--in-place", filepath.Join(dir, "s-run.ipynb")); code != 0 || content(t, filepath.Join(dir, "s-run.ipynb")) != first {
		t.Errorf("run again: %d %s", code, stderr)
	}
}

func TestRunFailure(t *testing.T) {
	dir := folder(t, map[string]string{"bad.adj": "6*7\n\n1/0\n\n1+1\n", "good.adj": "1+1\n"})
	out := filepath.Join(dir, "out") + "/"
	code, stdout, stderr := program(t, "", "run", "--json", "--to", out, filepath.Join(dir, "bad.adj"), filepath.Join(dir, "good.adj"), filepath.Join(dir, "missing.adj"))
	if code != 1 {
		t.Errorf("exit %d", code)
	}
	for _, want := range []string{"[2/3] failed  1/0", "[3/3] not run  1+1", "good.adj [1/1] ok", "missing.adj"} {
		if !strings.Contains(stderr, want) {
			t.Errorf("%q is not in %s", want, stderr)
		}
	}
	var reports []report
	if err := json.Unmarshal([]byte(stdout), &reports); err != nil {
		t.Fatal(err)
	}
	if len(reports) != 2 || reports[0].Failed != 1 || reports[0].Cells[1].Outcome != "failed" || reports[0].Cells[1].Error == "" || reports[1].Failed != 0 {
		t.Errorf("%+v", reports)
	}
	if n := content(t, out+"bad.ipynb"); !strings.Contains(n, `"output_type": "error"`) {
		t.Error("the failure is not in the notebook")
	}
	code, stdout, _ = program(t, "", "run", "--json", "--keep-going", "--to", out, filepath.Join(dir, "bad.adj"))
	if err := json.Unmarshal([]byte(stdout), &reports); err != nil || code != 1 || reports[0].Cells[2].Outcome != "ok" {
		t.Errorf("keep going: %d %s", code, stdout)
	}
}

func TestRunRefuses(t *testing.T) {
	dir := folder(t, map[string]string{
		"other.ipynb":  `{"cells":[{"cell_type":"code","source":"1"}],"nbformat":4,"metadata":{"kernelspec":{"language":"other","name":"x"}}}`,
		"broken.ipynb": "{",
		"text.txt":     "1+1",
	})
	for name, want := range map[string]string{"other.ipynb": "other", "broken.ipynb": "not a notebook", "text.txt": "neither", "none.ipynb": "no such file"} {
		code, _, stderr := program(t, "", "run", filepath.Join(dir, name))
		if code != 1 || !strings.Contains(stderr, want) {
			t.Errorf("%s: %d %s", name, code, stderr)
		}
	}
	if left, _ := filepath.Glob(filepath.Join(dir, "*-run.ipynb")); len(left) > 0 {
		t.Errorf("written all the same: %v", left)
	}
}

func TestRunToStandardOutput(t *testing.T) {
	code, stdout, _ := program(t, "6*7\n", "run", "-q", "--to", "-", "-")
	if code != 0 || !json.Valid([]byte(stdout)) || !strings.Contains(stdout, `"42"`) {
		t.Errorf("%d %s", code, stdout)
	}
	for _, args := range [][]string{{"run"}, {"run", "--to", "-", "--json", "x.adj"}, {"run", "--to", "x.ipynb", "a.adj", "b.adj"}, {"run", "--to", "x", "--in-place", "a.adj"}} {
		if code, _, stderr := program(t, "", args...); code == 0 || stderr == "" {
			t.Errorf("%v: %d %s", args, code, stderr)
		}
	}
}

func TestInstallAndUninstall(t *testing.T) {
	prefix := t.TempDir()
	for _, want := range []string{"installed", "already"} {
		if code, stdout, stderr := program(t, "", "install", "--prefix", prefix, "--name", "other", "--display-name", "Other"); code != 0 || !strings.Contains(stdout, want) {
			t.Errorf("%d %s %s", code, stdout, stderr)
		}
	}
	spec := content(t, filepath.Join(prefix, "share", "jupyter", "kernels", "other", "kernel.json"))
	if !strings.Contains(spec, `"Other"`) || !strings.Contains(spec, `"message"`) {
		t.Error(spec)
	}
	for _, want := range []string{"removed", "there is no kernel"} {
		if code, stdout, _ := program(t, "", "uninstall", "--prefix", prefix, "--name", "other"); code != 0 || !strings.Contains(stdout, want) {
			t.Errorf("%d %s", code, stdout)
		}
	}
	if code, _, _ := program(t, "", "install", "--prefix", prefix, "--user"); code == 0 {
		t.Error("two places at once are accepted")
	}
}

func TestVersion(t *testing.T) {
	code, stdout, _ := program(t, "", "version", "--json")
	var f facts
	if err := json.Unmarshal([]byte(stdout), &f); err != nil || code != 0 || f.Version == "" || f.Go == "" {
		t.Errorf("%d %s", code, stdout)
	}
}

func TestExplain(t *testing.T) {
	if code, stdout, _ := program(t, "", "explain", "trace"); code != 0 || !strings.Contains(stdout, "trace") {
		t.Errorf("%d %s", code, stdout)
	}
	if code, stdout, stderr := program(t, "", "explain", "trase"); code != 1 || stdout != "" || !strings.Contains(stderr, "not in the vocabulary") {
		t.Errorf("%d %s %s", code, stdout, stderr)
	}
	if code, stdout, _ := program(t, "", "explain", "--json"); code != 0 || !json.Valid([]byte(stdout)) {
		t.Errorf("%d %s", code, stdout)
	}
}

func TestEveryCommandHasAnExample(t *testing.T) {
	var visit func(c *cobra.Command)
	visit = func(c *cobra.Command) {
		if c.Name() != "help" && (c.Example == "" || c.Short == "") {
			t.Errorf("%s has no example", c.CommandPath())
		}
		for _, s := range c.Commands() {
			visit(s)
		}
	}
	visit(newRoot())
}

// The program as a process that Jupyter would start.
func TestKernelAsAProcess(t *testing.T) {
	t.Setenv(beProgram, "1")
	for _, f := range selfTest(os.Args[0]) {
		if f.Level != fine {
			t.Errorf("%+v", f)
		}
	}
}

func TestKernelRefuses(t *testing.T) {
	dir := folder(t, map[string]string{"empty.json": "{}", "list.json": "[]"})
	for name, want := range map[string]string{"empty.json": "no address", "list.json": "neither", "none.json": "no such file"} {
		if code, _, stderr := program(t, "", "kernel", "--connection-file", filepath.Join(dir, name)); code != 1 || !strings.Contains(stderr, want) {
			t.Errorf("%s: %d %s", name, code, stderr)
		}
	}
	if code, _, _ := program(t, "", "kernel"); code != 2 {
		t.Error("no file is accepted")
	}
}

func TestDoctorJudgesKernelspecs(t *testing.T) {
	prefix := t.TempDir()
	if code, _, stderr := program(t, "", "install", "--prefix", prefix); code != 0 {
		t.Fatal(stderr)
	}
	dir := filepath.Join(prefix, "share", "jupyter", "kernels", "adjoin")
	spec, err := kernelspec.Read(dir)
	if err != nil {
		t.Fatal(err)
	}
	found := func(change func(f *kernelspec.Found)) string {
		f := kernelspec.Found{Name: "adjoin", Dir: dir, Spec: spec}
		f.Spec.Argv = append([]string(nil), spec.Argv...)
		change(&f)
		return installed(f, os.Args[0]).Level
	}
	for name, c := range map[string]struct {
		change func(f *kernelspec.Found)
		want   string
	}{
		"as installed":    {func(*kernelspec.Found) {}, fine},
		"program gone":    {func(f *kernelspec.Found) { f.Spec.Argv[0] = filepath.Join(prefix, "gone") }, trouble},
		"no program":      {func(f *kernelspec.Found) { f.Spec.Argv = nil }, trouble},
		"hidden":          {func(f *kernelspec.Found) { f.Hidden = true }, note},
		"another version": {func(f *kernelspec.Found) { f.Spec.Metadata = nil }, note},
		"another program": {func(f *kernelspec.Found) { f.Spec.Argv[0] = filepath.Join(dir, "kernel.json") }, note},
	} {
		if got := found(c.change); got != c.want {
			t.Errorf("%s: %s", name, got)
		}
	}
}
