package kernelspec

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
)

// Target is where a kernelspec goes and what it is called.
type Target struct {
	System      System
	Data        string // Jupyter's data folder
	Name        string // of the folder; DefaultName when empty
	DisplayName string // DefaultDisplayName when empty
}

// Installation is what to install.
type Installation struct {
	Target
	Program string // path of the binary that starts the kernel
	Version string // of that binary
	Copy    bool   // put a copy of the binary beside kernel.json and start that
}

var validName = regexp.MustCompile(`^[a-zA-Z0-9._-]+$`)

// Dir is the folder of the kernelspec.
func (t Target) Dir() (string, error) {
	if t.Name == "" {
		t.Name = DefaultName
	}
	if !validName.MatchString(t.Name) || t.Name == "." || t.Name == ".." {
		return "", fmt.Errorf("%q cannot be the name of a kernel: letters, digits, dots, hyphens and underscores make one", t.Name)
	}
	return t.System.kernels(t.Data, t.Name), nil
}

// Install writes the kernelspec, and what colours cells, and returns the
// kernelspec's folder. Changed is false when
// everything was in place already.
func (i Installation) Install() (dir string, changed bool, err error) {
	if dir, err = i.Dir(); err != nil {
		return "", false, err
	}
	if old, err := Read(dir); err == nil && !old.Ours() {
		return dir, false, fmt.Errorf("%s belongs to another kernel, %q; choose another name with --name", dir, old.DisplayName)
	}
	files, err := i.files(dir)
	if err != nil {
		return dir, false, err
	}
	if changed, err = i.installExtension(); err != nil {
		return dir, changed, err
	}
	if err := os.MkdirAll(dir, 0o755); err != nil {
		return dir, changed, err
	}
	for _, f := range files {
		c, err := f.write(dir)
		if err != nil {
			return dir, changed, err
		}
		changed = changed || c
	}
	return dir, changed, nil
}

type file struct {
	name    string
	content []byte
	mode    fs.FileMode
}

// files are those of the kernelspec; kernel.json is the last, since Jupyter
// takes the folder for a kernel when that is there.
func (i Installation) files(dir string) ([]file, error) {
	files := []file{
		{"logo-32x32.png", logo32, 0o644},
		{"logo-64x64.png", logo64, 0o644},
		{"logo-svg.svg", logoSVG, 0o644},
	}
	program, err := filepath.Abs(i.Program)
	if err != nil {
		return nil, err
	}
	if i.Copy {
		binary, err := os.ReadFile(program)
		if err != nil {
			return nil, err
		}
		name := "adjoin"
		if i.System.OS == "windows" {
			name = "adjoin.exe"
		}
		files = append(files, file{name, binary, 0o755})
		program = "{resource_dir}/" + name
	} else if root := temporary(program, i.System.Getenv); root != "" && temporary(dir, i.System.Getenv) == "" {
		return nil, fmt.Errorf("%s lies in a folder of temporary files (%s), so the kernel would stop working when it is cleared; "+
			"move the program to a lasting place first, or let --copy put a copy of it beside the kernelspec", program, root)
	}
	display := i.DisplayName
	if display == "" {
		display = DefaultDisplayName
	}
	spec, err := newSpec(program, display, i.Version)
	if err != nil {
		return nil, err
	}
	b, err := spec.encode()
	if err != nil {
		return nil, err
	}
	return append(files, file{"kernel.json", b, 0o644}), nil
}

// write puts the file into dir, in one step, unless it is there already.
func (f file) write(dir string) (changed bool, err error) {
	path := filepath.Join(dir, f.name)
	if old, err := os.ReadFile(path); err == nil && bytes.Equal(old, f.content) {
		return false, nil
	}
	t, err := os.CreateTemp(dir, ".new-*")
	if err != nil {
		return false, err
	}
	defer os.Remove(t.Name())
	_, err = t.Write(f.content)
	if err := errors.Join(err, t.Close()); err != nil {
		return false, err
	}
	if err := os.Chmod(t.Name(), f.mode); err != nil {
		return false, err
	}
	return true, os.Rename(t.Name(), path)
}

// Uninstall removes what Install has written; found is false when there was
// nothing.
func (t Target) Uninstall() (dir string, found bool, err error) {
	if dir, err = t.Dir(); err != nil {
		return "", false, err
	}
	spec, err := Read(dir)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return dir, false, nil
	case err != nil:
		return dir, true, err
	case !spec.Ours():
		return dir, true, fmt.Errorf("%s belongs to another kernel, %q, and is left alone", dir, spec.DisplayName)
	}
	if err := os.RemoveAll(dir); err != nil {
		return dir, true, err
	}
	return dir, true, t.uninstallExtension()
}

// Read reads the kernel.json in dir.
func Read(dir string) (Spec, error) {
	var s Spec
	b, err := os.ReadFile(filepath.Join(dir, "kernel.json"))
	if err != nil {
		return s, err
	}
	if err := json.Unmarshal(b, &s); err != nil {
		return s, fmt.Errorf("%s: %w", filepath.Join(dir, "kernel.json"), err)
	}
	return s, nil
}

// Found is a kernelspec that Jupyter finds.
type Found struct {
	Name   string
	Dir    string
	Hidden bool // by one of the same name in an earlier place
	Spec   Spec
	Err    error // of reading it
}

// Find lists the kernelspecs in all places, in the order in which Jupyter
// looks.
func Find(places []Place) []Found {
	var found []Found
	seen := map[string]bool{}
	for _, p := range places {
		dirs, err := filepath.Glob(filepath.Join(p.Path, "kernels", "*", "kernel.json"))
		if err != nil {
			continue
		}
		for _, k := range dirs {
			dir := filepath.Dir(k)
			f := Found{Name: filepath.Base(dir), Dir: dir, Hidden: seen[filepath.Base(dir)]}
			f.Spec, f.Err = Read(dir)
			seen[f.Name] = true
			found = append(found, f)
		}
	}
	return found
}
