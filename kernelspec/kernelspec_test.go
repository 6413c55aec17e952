package kernelspec

import (
	"bytes"
	"encoding/json"
	"flag"
	"image/png"
	"os"
	"path/filepath"
	"reflect"
	"strings"
	"testing"

	"adjoin/kernelspec/mark"
	"adjoin/lang"
)

var update = flag.Bool("update", false, "draw the logos anew")

func TestLogosAreAsDrawn(t *testing.T) {
	for name, f := range map[string]struct{ drawn, embedded []byte }{
		"logo-32x32.png": {mark.PNG(32), logo32},
		"logo-64x64.png": {mark.PNG(64), logo64},
		"logo-svg.svg":   {mark.SVG(), logoSVG},
	} {
		if *update {
			if err := os.WriteFile(filepath.Join("files", name), f.drawn, 0o644); err != nil {
				t.Fatal(err)
			}
			continue
		}
		if strings.HasSuffix(name, ".png") {
			samePicture(t, name, f.drawn, f.embedded)
		} else if !bytes.Equal(f.drawn, f.embedded) {
			t.Errorf("%s is not as drawn", name)
		}
	}
}

// samePicture compares pixels: how they are packed may change with the
// library.
func samePicture(t *testing.T, name string, a, b []byte) {
	t.Helper()
	x, err := png.Decode(bytes.NewReader(a))
	if err != nil {
		t.Fatal(err)
	}
	y, err := png.Decode(bytes.NewReader(b))
	if err != nil {
		t.Fatal(err)
	}
	if !reflect.DeepEqual(x, y) {
		t.Errorf("%s is not as drawn", name)
	}
}

func system(os string, env map[string]string) System {
	home := "/home/ada"
	switch os {
	case "darwin":
		home = "/Users/ada"
	case "windows":
		home = `C:\Users\ada`
	}
	return System{OS: os, Home: home, Getenv: func(k string) string { return env[k] }, Prefix: func() string { return "" }}
}

// Source: "Common directories and file locations", Jupyter documentation,
// section "Data files".
func TestUserData(t *testing.T) {
	for _, c := range []struct {
		os, want string
		env      map[string]string
	}{
		{"linux", "/home/ada/.local/share/jupyter", nil},
		{"linux", "/data/jupyter", map[string]string{"XDG_DATA_HOME": "/data"}},
		{"linux", "/j", map[string]string{"JUPYTER_DATA_DIR": "/j", "XDG_DATA_HOME": "/data"}},
		{"freebsd", "/home/ada/.local/share/jupyter", nil},
		{"darwin", "/Users/ada/Library/Jupyter", nil},
		{"darwin", "/Users/ada/Library/Jupyter", map[string]string{"XDG_DATA_HOME": "/data"}},
		{"windows", `C:\Users\ada\AppData\Roaming\jupyter`, map[string]string{"APPDATA": `C:\Users\ada\AppData\Roaming`}},
		{"windows", `C:\Users\ada\.jupyter\data`, nil},
	} {
		if got := system(c.os, c.env).UserData(); got != c.want {
			t.Errorf("%s %v: %s, want %s", c.os, c.env, got, c.want)
		}
	}
}

func TestPlacesInOrder(t *testing.T) {
	list := func(s System) string {
		var b []string
		for _, p := range s.Places() {
			b = append(b, p.Path)
		}
		return strings.Join(b, " ")
	}
	const user, sys = "/home/ada/.local/share/jupyter", "/usr/local/share/jupyter /usr/share/jupyter"
	for _, c := range []struct {
		env  map[string]string
		want string
	}{
		{nil, user + " " + sys},
		{map[string]string{"JUPYTER_PATH": "/a:/b"}, "/a /b " + user + " " + sys},
		{map[string]string{"VIRTUAL_ENV": "/venv"}, "/venv/share/jupyter " + user + " " + sys},
		{map[string]string{"CONDA_PREFIX": "/conda", "JUPYTER_PREFER_ENV_PATH": "0"}, user + " /conda/share/jupyter " + sys},
	} {
		if got := list(system("linux", c.env)); got != c.want {
			t.Errorf("%v: %s, want %s", c.env, got, c.want)
		}
	}
	windows := list(system("windows", map[string]string{"APPDATA": `C:\A`, "PROGRAMDATA": `C:\P`, "JUPYTER_PATH": `C:\x;D:\y`}))
	if want := `C:\x D:\y C:\A\jupyter C:\P\jupyter`; windows != want {
		t.Errorf("%s, want %s", windows, want)
	}
}

// lasting is an installation from a folder that does not pass for temporary.
func lasting(t *testing.T) Installation {
	t.Helper()
	s := Here()
	s.Getenv = func(string) string { return "" }
	program := filepath.Join(t.TempDir(), "adjoin")
	if err := os.WriteFile(program, []byte("binary"), 0o755); err != nil {
		t.Fatal(err)
	}
	return Installation{Target: Target{System: s, Data: t.TempDir()}, Program: program, Version: "1.0.0"}
}

func TestInstallIsIdempotent(t *testing.T) {
	i := lasting(t)
	dir, changed, err := i.Install()
	if err != nil || !changed {
		t.Fatal(changed, err)
	}
	if _, changed, err = i.Install(); err != nil || changed {
		t.Errorf("the second time: changed %v, %v", changed, err)
	}
	i.Version = "1.1.0"
	if _, changed, err = i.Install(); err != nil || !changed {
		t.Errorf("a new version: changed %v, %v", changed, err)
	}
	names, _ := filepath.Glob(filepath.Join(dir, "*"))
	hidden, _ := filepath.Glob(filepath.Join(dir, ".*"))
	if len(names) != 4 || len(hidden) != 0 {
		t.Errorf("files: %v %v", names, hidden)
	}
	if _, found, err := i.Uninstall(); !found || err != nil {
		t.Errorf("uninstall: %v %v", found, err)
	}
	if _, found, err := i.Uninstall(); found || err != nil {
		t.Errorf("uninstall again: %v %v", found, err)
	}
	if _, err := os.Stat(dir); !os.IsNotExist(err) {
		t.Error("the folder is still there")
	}
}

func TestExtensionStaysWhileItIsNeeded(t *testing.T) {
	one := lasting(t)
	two := one
	two.Name = "two"
	for _, i := range []Installation{one, two} {
		if _, _, err := i.Install(); err != nil {
			t.Fatal(err)
		}
	}
	script := filepath.Join(one.Data, "labextensions", "adjoin-notation", "static", "remoteEntry.js")
	for _, c := range []struct {
		i    Installation
		left bool
	}{{one, true}, {two, false}} {
		if _, _, err := c.i.Uninstall(); err != nil {
			t.Fatal(err)
		}
		if _, err := os.Stat(script); (err == nil) != c.left {
			t.Errorf("after removing %q: %v", c.i.Name, err)
		}
	}
}

// The words that the extension colours are those that the grammar reserves.
func TestExtensionKnowsTheKeywords(t *testing.T) {
	b, err := extensionFiles.ReadFile("files/labextension/static/remoteEntry.js")
	if err != nil {
		t.Fatal(err)
	}
	_, list, ok := strings.Cut(string(b), "KEYWORDS = /^(?:")
	list, _, ok2 := strings.Cut(list, ")")
	if !ok || !ok2 {
		t.Fatal("there is no list of keywords")
	}
	for word := range strings.SplitSeq(list, "|") {
		if k := lang.Tokens(word); len(k) != 1 || k[0].Kind != lang.KindKeyword {
			t.Errorf("%s is no keyword", word)
		}
	}
	// The language's own list, as its reference has it.
	for word := range strings.FieldsSeq("let where for in of over by to at from with as is not and or if then else claim mod divides") {
		if !strings.Contains("|"+list+"|", "|"+word+"|") {
			t.Errorf("%s is missing", word)
		}
	}
}

// Source of the keys: JupyterLab documentation 4, "Distributing a prebuilt
// extension": the server reads name, version and jupyterlab._build.load and
// .extension.
func TestExtensionPackage(t *testing.T) {
	b, err := extensionFiles.ReadFile("files/labextension/package.json")
	if err != nil {
		t.Fatal(err)
	}
	var p struct {
		Name, Version string
		JupyterLab    struct {
			Build struct{ Load, Extension string } `json:"_build"`
		}
	}
	if err := json.Unmarshal(b, &p); err != nil {
		t.Fatal(err)
	}
	if p.Name != extensionName || p.Version == "" || p.JupyterLab.Build.Load != "static/remoteEntry.js" || p.JupyterLab.Build.Extension != "./extension" {
		t.Errorf("%+v", p)
	}
	if _, err := extensionFiles.ReadFile("files/labextension/" + p.JupyterLab.Build.Load); err != nil {
		t.Error(err)
	}
}

// Source of the shape: Jupyter Enhancement Proposal 105, "Kernelspec
// specification": argv, display_name and language are required; interrupt_mode
// is signal or message; metadata has an object under each name.
func TestKernelJSON(t *testing.T) {
	i := lasting(t)
	i.DisplayName = "Adjoin <here>"
	dir, _, err := i.Install()
	if err != nil {
		t.Fatal(err)
	}
	b, err := os.ReadFile(filepath.Join(dir, "kernel.json"))
	if err != nil {
		t.Fatal(err)
	}
	var got map[string]any
	if err := json.Unmarshal(b, &got); err != nil {
		t.Fatal(err)
	}
	want := map[string]any{
		"argv":                    []any{i.Program, "kernel", "--connection-file", "{connection_file}"},
		"display_name":            "Adjoin <here>",
		"language":                "adjoin",
		"interrupt_mode":          "message",
		"kernel_protocol_version": "5.5",
		"env":                     map[string]any{},
		"metadata":                map[string]any{"adjoin": map[string]any{"version": "1.0.0"}},
	}
	if !reflect.DeepEqual(got, want) {
		t.Errorf("%s", b)
	}
}

func TestInstallCopies(t *testing.T) {
	i := lasting(t)
	i.Copy = true
	dir, _, err := i.Install()
	if err != nil {
		t.Fatal(err)
	}
	spec, err := Read(dir)
	if err != nil {
		t.Fatal(err)
	}
	name, ok := strings.CutPrefix(spec.Argv[0], "{resource_dir}/")
	if b, err := os.ReadFile(filepath.Join(dir, name)); !ok || err != nil || string(b) != "binary" {
		t.Errorf("%s: %q %v", spec.Argv[0], b, err)
	}
}

func TestInstallRefuses(t *testing.T) {
	i := lasting(t)
	i.Data = "/usr/local/nowhere" // where a kernelspec would last
	if _, _, err := i.Install(); err == nil || !strings.Contains(err.Error(), "--copy") {
		t.Errorf("a temporary program: %v", err)
	}
	for _, name := range []string{"a b", "a/b", "..", "ä"} {
		j := lasting(t)
		j.Name = name
		if _, _, err := j.Install(); err == nil {
			t.Errorf("the name %q is accepted", name)
		}
	}
	k := lasting(t)
	dir, _ := k.Dir()
	if err := os.MkdirAll(dir, 0o755); err != nil {
		t.Fatal(err)
	}
	other := []byte(`{"argv":["x"],"display_name":"Other","language":"other"}`)
	if err := os.WriteFile(filepath.Join(dir, "kernel.json"), other, 0o644); err != nil {
		t.Fatal(err)
	}
	if _, _, err := k.Install(); err == nil || !strings.Contains(err.Error(), "--name") {
		t.Errorf("another's folder: %v", err)
	}
	if _, _, err := k.Uninstall(); err == nil {
		t.Error("another's kernelspec is removed")
	}
}

func TestTemporary(t *testing.T) {
	env := func(k string) string { return map[string]string{"GOCACHE": "/elsewhere/cache"}[k] }
	for path, want := range map[string]bool{
		"/tmp/go-build1/b001/exe/adjoin": true,
		"/elsewhere/cache/ab/adjoin":     true,
		"/mnt/x/go-build77/exe/adjoin":   true,
		"/usr/local/bin/adjoin":          false,
		"/tmpfiles/adjoin":               false,
		"/elsewhere/adjoin":              false,
	} {
		if got := temporary(path, env) != ""; got != want {
			t.Errorf("%s: %v", path, got)
		}
	}
}

func TestFindInOrder(t *testing.T) {
	first, second := lasting(t), lasting(t)
	for _, i := range []Installation{first, second} {
		if _, _, err := i.Install(); err != nil {
			t.Fatal(err)
		}
	}
	found := Find([]Place{{Path: first.Data}, {Path: filepath.Join(first.Data, "missing")}, {Path: second.Data}})
	if len(found) != 2 || found[0].Hidden || !found[1].Hidden || !found[0].Spec.Ours() || found[0].Spec.Version() != "1.0.0" {
		t.Errorf("%+v", found)
	}
}
