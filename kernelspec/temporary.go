package kernelspec

import (
	"os"
	"path/filepath"
	"strings"
)

// temporary is the folder of passing things that path lies in, or "": the
// system's temporary folders and the caches of the Go command.
func temporary(path string, getenv func(string) string) string {
	path = filepath.ToSlash(resolved(path))
	roots := []string{os.TempDir(), "/tmp", "/var/tmp", "/private/tmp", "/private/var/folders", "/dev/shm"}
	for _, name := range []string{"GOCACHE", "GOTMPDIR", "TMPDIR", "TEMP", "TMP", "XDG_CACHE_HOME"} {
		if d := getenv(name); d != "" {
			roots = append(roots, d)
		}
	}
	if d, err := os.UserCacheDir(); err == nil {
		roots = append(roots, d)
	}
	for _, root := range roots {
		root = strings.TrimSuffix(filepath.ToSlash(resolved(root)), "/")
		if root != "" && strings.HasPrefix(path, root+"/") {
			return root
		}
	}
	// A cache that was moved by the Go command's own settings.
	if i := strings.Index(path, "/go-build"); i >= 0 {
		return path[:i]
	}
	return ""
}

// resolved is path without links, as far as it exists.
func resolved(path string) string {
	if p, err := filepath.Abs(path); err == nil {
		path = p
	}
	rest := ""
	for p := path; ; {
		if q, err := filepath.EvalSymlinks(p); err == nil {
			return filepath.Join(q, rest)
		}
		parent := filepath.Dir(p)
		if parent == p {
			return path
		}
		rest = filepath.Join(filepath.Base(p), rest)
		p = parent
	}
}
