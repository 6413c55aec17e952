package outside

import (
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"sync"
	"testing"
)

// stub is a testing.TB that records how the test would have ended.
type stub struct {
	testing.TB
	skipped, failed bool
}

func (s *stub) Helper()             {}
func (s *stub) Logf(string, ...any) {}
func (s *stub) Skipf(string, ...any) {
	s.skipped = true
	panic(s)
}
func (s *stub) Fatalf(string, ...any) {
	s.failed = true
	panic(s)
}
func (s *stub) Fatal(...any) {
	s.failed = true
	panic(s)
}

func attempt(t *testing.T, f func(t testing.TB)) (s *stub) {
	s = &stub{TB: t}
	defer func() {
		if r := recover(); r != nil && r != any(s) {
			panic(r)
		}
	}()
	f(s)
	return s
}

func TestSkipsOrFails(t *testing.T) {
	t.Setenv("HOME", t.TempDir())
	t.Setenv("XDG_CACHE_HOME", t.TempDir())
	t.Setenv("LocalAppData", t.TempDir())
	requirements := filepath.Join(t.TempDir(), "requirements.txt")
	if err := os.WriteFile(requirements, []byte("# nothing\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	program := func(t testing.TB) { Program(t, "no-such-program-anywhere") }
	python := func(t testing.TB) { Python(t, requirements) }

	t.Setenv("ADJOIN_REQUIRE", "")
	if s := attempt(t, program); !s.skipped {
		t.Error("a missing program does not skip")
	}
	if s := attempt(t, python); !s.skipped {
		t.Error("a missing environment does not skip")
	}
	t.Setenv("ADJOIN_REQUIRE", "all")
	if s := attempt(t, program); !s.failed {
		t.Error("a missing program does not fail although required")
	}
	t.Setenv("PATH", "")
	if s := attempt(t, python); !s.failed {
		t.Error("a missing Python does not fail although required")
	}
}

// Several ask at once for an environment that is not there yet.
func TestOneEnvironmentForAll(t *testing.T) {
	if testing.Short() || !required() {
		t.Skip("makes a Python environment; ADJOIN_REQUIRE=all runs it")
	}
	t.Setenv("XDG_CACHE_HOME", t.TempDir())
	t.Setenv("HOME", t.TempDir())
	t.Setenv("LocalAppData", t.TempDir())
	requirements := filepath.Join(t.TempDir(), "requirements.txt")
	if err := os.WriteFile(requirements, []byte("# nothing\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	var got [4]string
	var all sync.WaitGroup
	for i := range got {
		all.Go(func() { got[i] = Python(t, requirements) })
	}
	all.Wait()
	for _, path := range got {
		if path != got[0] {
			t.Errorf("two environments: %s and %s", got[0], path)
		}
	}
	out, err := exec.Command(got[0], "-c", "import sys; print(sys.prefix != sys.base_prefix)").CombinedOutput()
	if err != nil || strings.TrimSpace(string(out)) != "True" {
		t.Errorf("no environment of its own: %v %s", err, out)
	}
}
