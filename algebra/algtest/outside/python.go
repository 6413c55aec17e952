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

// Python is the interpreter of an environment that has the packages of a
// requirements file. The environment lies in the user's cache and is named by
// a digest of the file, so that a changed file gets a new one. Tests of several
// packages may ask at once: one makes it, the others wait.
func Python(t testing.TB, requirements string) string {
	t.Helper()
	if testing.Short() && !required() {
		t.Skip("runs Python; not in short mode")
	}
	text, err := os.ReadFile(requirements)
	if err != nil {
		t.Fatal(err)
	}
	cache, err := os.UserCacheDir()
	if err != nil {
		missing(t, "needs a cache folder: %v", err)
	}
	digest := sha256.Sum256(text)
	dir := filepath.Join(cache, "adjoin-tests", hex.EncodeToString(digest[:8]))
	if ready(dir) {
		return interpreter(dir)
	}
	if !required() {
		t.Skipf("needs the Python packages of %s; ADJOIN_REQUIRE=all gets them", requirements)
	}
	if err := os.MkdirAll(filepath.Dir(dir), 0o755); err != nil {
		t.Fatal(err)
	}
	unlock, err := lockedfile.MutexAt(dir + ".lock").Lock()
	if err != nil {
		t.Fatal(err)
	}
	defer unlock()
	if ready(dir) {
		return interpreter(dir)
	}
	t.Logf("making a Python environment in %s", dir)
	if err := create(dir, requirements); err != nil {
		t.Fatal(err)
	}
	return interpreter(dir)
}

func interpreter(dir string) string {
	if runtime.GOOS == "windows" {
		return filepath.Join(dir, "Scripts", "python.exe")
	}
	return filepath.Join(dir, "bin", "python")
}

// ready tells whether the environment is whole: the mark is made last. An
// interpreter whose system Python went away is not ready.
func ready(dir string) bool {
	_, mark := os.Stat(filepath.Join(dir, "ready"))
	_, python := os.Stat(interpreter(dir))
	return mark == nil && python == nil
}

func create(dir, requirements string) error {
	system, err := systemPython()
	if err != nil {
		return err
	}
	if err := os.RemoveAll(dir); err != nil {
		return err
	}
	for _, c := range [][]string{
		{system, "-m", "venv", dir},
		{interpreter(dir), "-m", "pip", "install", "--quiet", "--disable-pip-version-check", "--no-input", "-r", requirements},
	} {
		if out, err := exec.Command(c[0], c[1:]...).CombinedOutput(); err != nil {
			return fmt.Errorf("%v: %w\n%s", c, err, out)
		}
	}
	return os.WriteFile(filepath.Join(dir, "ready"), nil, 0o644)
}

// systemPython is a Python that can make environments.
func systemPython() (string, error) {
	var last error
	for _, name := range []string{"python3", "python"} {
		path, err := exec.LookPath(name)
		if err != nil {
			last = err
			continue
		}
		const check = "import sys, venv, ensurepip; sys.exit(sys.version_info < (3, 11) and 'older than 3.11')"
		if out, err := exec.Command(path, "-c", check).CombinedOutput(); err != nil {
			last = fmt.Errorf("%s: %w: %s", name, err, out)
			continue
		}
		return path, nil
	}
	return "", fmt.Errorf("no Python 3.11 or later that can make environments: %w", last)
}
