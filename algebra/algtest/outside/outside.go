// Package outside gives tests what lies outside the project: a Python
// environment of their own with pinned packages, and programs of the machine.
//
// Where such a thing is not there, the test is skipped and says why. The
// environment variable ADJOIN_REQUIRE=all turns each such skip into a failure,
// and lets Python make the environments that are missing: they are large and
// come over the network, so nobody gets them without having asked.
//
// Where to start reading: python.go; programs and the rule of skipping are
// here.
package outside

import (
	"os"
	"os/exec"
	"testing"
)

// required tells whether every test must run.
func required() bool { return os.Getenv("ADJOIN_REQUIRE") == "all" }

// missing skips the test for a reason, or fails it when every test must run.
func missing(t testing.TB, format string, args ...any) {
	t.Helper()
	if required() {
		t.Fatalf("required: "+format, args...)
	}
	t.Skipf(format, args...)
}

// Program is the path of the first of the named programs that the machine has.
func Program(t testing.TB, names ...string) string {
	t.Helper()
	for _, name := range names {
		if path, err := exec.LookPath(name); err == nil {
			return path
		}
	}
	missing(t, "needs the program %s", names[0])
	return ""
}
