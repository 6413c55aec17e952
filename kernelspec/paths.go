package kernelspec

import (
	"os"
	"os/exec"
	"path"
	"runtime"
	"strings"
)

// System is what the places where Jupyter looks depend on.
type System struct {
	OS     string // as runtime.GOOS
	Getenv func(string) string
	Home   string
	// Prefix asks the Python on the path for its prefix; empty when there is
	// none.
	Prefix func() string
}

// Here is the system that the program runs on.
func Here() System {
	home, _ := os.UserHomeDir()
	return System{OS: runtime.GOOS, Getenv: os.Getenv, Home: home, Prefix: pythonPrefix}
}

func pythonPrefix() string {
	for _, python := range []string{"python3", "python"} {
		out, err := exec.Command(python, "-c", "import sys; print(sys.prefix)").Output()
		if err == nil {
			return strings.TrimSpace(string(out))
		}
	}
	return ""
}

// join joins with the separator of s.OS, which may not be that of the system
// that the program runs on.
func (s System) join(elements ...string) string {
	if s.OS != "windows" {
		return path.Join(elements...)
	}
	var kept []string
	for i, e := range elements {
		e = strings.TrimRight(strings.ReplaceAll(e, "/", `\`), `\`)
		if i > 0 {
			e = strings.TrimLeft(e, `\`)
		}
		if e != "" {
			kept = append(kept, e)
		}
	}
	return strings.Join(kept, `\`)
}

// UserData is Jupyter's data folder of the user.
func (s System) UserData() string {
	if d := s.Getenv("JUPYTER_DATA_DIR"); d != "" {
		return d
	}
	switch s.OS {
	case "darwin":
		return s.join(s.Home, "Library", "Jupyter")
	case "windows":
		if d := s.Getenv("APPDATA"); d != "" {
			return s.join(d, "jupyter")
		}
		return s.join(s.Home, ".jupyter", "data")
	}
	if d := s.Getenv("XDG_DATA_HOME"); d != "" {
		return s.join(d, "jupyter")
	}
	return s.join(s.Home, ".local", "share", "jupyter")
}

// EnvironmentPrefix is that of the active Python environment, or of the Python
// on the path; empty when there is none.
func (s System) EnvironmentPrefix() string {
	for _, name := range []string{"VIRTUAL_ENV", "CONDA_PREFIX"} {
		if d := s.Getenv(name); d != "" {
			return d
		}
	}
	return s.Prefix()
}

// PrefixData is Jupyter's data folder below an installation prefix.
func (s System) PrefixData(prefix string) string { return s.join(prefix, "share", "jupyter") }

// SystemData are Jupyter's data folders for all users.
func (s System) SystemData() []string {
	if s.OS == "windows" {
		if d := s.Getenv("PROGRAMDATA"); d != "" {
			return []string{s.join(d, "jupyter")}
		}
		return nil
	}
	return []string{"/usr/local/share/jupyter", "/usr/share/jupyter"}
}

// Place is a folder in which Jupyter looks for data.
type Place struct {
	Path string
	Kind string // JUPYTER_PATH, user, environment or system
}

// Places are the folders in which Jupyter looks, the first that has something
// wins.
func (s System) Places() []Place {
	var places []Place
	add := func(kind string, paths ...string) {
		for _, p := range paths {
			known := p == ""
			for _, q := range places {
				known = known || q.Path == p
			}
			if !known {
				places = append(places, Place{p, kind})
			}
		}
	}
	separator := ":"
	if s.OS == "windows" {
		separator = ";"
	}
	for d := range strings.SplitSeq(s.Getenv("JUPYTER_PATH"), separator) {
		add("JUPYTER_PATH", d)
	}
	environment := ""
	if p := s.EnvironmentPrefix(); p != "" {
		environment = s.PrefixData(p)
	}
	if s.prefersEnvironment() {
		add("environment", environment)
		add("user", s.UserData())
	} else {
		add("user", s.UserData())
		add("environment", environment)
	}
	add("system", s.SystemData()...)
	return places
}

// prefersEnvironment says whether the folder of the Python environment comes
// before the user's: when told so, or when an environment is active.
func (s System) prefersEnvironment() bool {
	switch strings.ToLower(s.Getenv("JUPYTER_PREFER_ENV_PATH")) {
	case "":
		return s.Getenv("VIRTUAL_ENV") != "" || s.Getenv("CONDA_PREFIX") != ""
	case "0", "no", "n", "false", "off":
		return false
	}
	return true
}

// kernels is the folder of a kernelspec below a data folder.
func (s System) kernels(data, name string) string { return s.join(data, "kernels", name) }
