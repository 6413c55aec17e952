// Package outside gives tests what lies outside the project: a Python
// environment of their own with pinned packages, and programs of the machine.
//
// Where such a thing cannot be had the test is skipped, and says why. With
// ADJOIN_REQUIRE=all in the environment it fails instead, so that a gate can
// insist on every test.
package outside

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"testing"

	"github.com/rogpeppe/go-internal/lockedfile"
)

// unavailable skips the test for a reason, or fails it when everything is required.
func unavailable(t testing.TB, format string, args ...any) {
	t.Helper()
	if os.Getenv("ADJOIN_REQUIRE") == "all" {
		t.Fatalf("required: "+format, args...)
	}
	t.Skipf(format, args...)
}

// Python is the interpreter of an environment that has the packages of a
// requirements file. The environment lives in the user's cache, is named by a
// digest of the file, and is made by whoever needs it first.
func Python(t testing.TB, requirements string) string {
	t.Helper()
	if testing.Short() && os.Getenv("ADJOIN_REQUIRE") != "all" {
		t.Skip("needs packages from outside; not in short mode")
	}
	text, err := os.ReadFile(requirements)
	if err != nil {
		t.Fatal(err)
	}
	system, err := findPython()
	if err != nil {
		unavailable(t, "needs Python 3.10 or later: %v", err)
	}
	cache, err := os.UserCacheDir()
	if err != nil {
		unavailable(t, "needs a cache folder: %v", err)
	}
	digest := sha256.Sum256(text)
	dir := filepath.Join(cache, "adjoin-tests", hex.EncodeToString(digest[:8]))
	python := filepath.Join(dir, "bin", "python")
	if runtime.GOOS == "windows" {
		python = filepath.Join(dir, "Scripts", "python.exe")
	}
	if err := os.MkdirAll(filepath.Dir(dir), 0o755); err != nil {
		unavailable(t, "needs a cache folder: %v", err)
	}
	unlock, err := lockedfile.MutexAt(dir + ".lock").Lock()
	if err != nil {
		unavailable(t, "needs a cache folder that can be locked: %v", err)
	}
	defer unlock()
	ready := filepath.Join(dir, "ready")
	if _, err := os.Stat(ready); err == nil {
		return python
	}
	if err := os.RemoveAll(dir); err != nil {
		t.Fatal(err)
	}
	t.Logf("making a Python environment from %s", filepath.Base(requirements))
	for _, c := range [][]string{
		{system, "-m", "venv", dir},
		{python, "-m", "pip", "install", "--quiet", "--disable-pip-version-check", "--retries", "2", "-r", requirements},
	} {
		if out, err := exec.Command(c[0], c[1:]...).CombinedOutput(); err != nil {
			unavailable(t, "%s: %v\n%s", filepath.Base(c[0]), err, out)
		}
	}
	if err := os.WriteFile(ready, nil, 0o644); err != nil {
		t.Fatal(err)
	}
	return python
}

func findPython() (string, error) {
	var last error
	for _, name := range []string{"python3", "python"} {
		path, err := exec.LookPath(name)
		if err != nil {
			last = err
			continue
		}
		const check = "import sys, venv, ensurepip; sys.exit(sys.version_info < (3, 10))"
		if out, err := exec.Command(path, "-c", check).CombinedOutput(); err != nil {
			last = fmt.Errorf("%s: %v %s", name, err, out)
			continue
		}
		return path, nil
	}
	return "", last
}

// Program is the path of the first of the named programs that the machine has.
func Program(t testing.TB, names ...string) string {
	t.Helper()
	for _, name := range names {
		if path, err := exec.LookPath(name); err == nil {
			return path
		}
	}
	unavailable(t, "needs the program %s", names[0])
	return ""
}
