package kernelspec

import (
	"embed"
	"io/fs"
	"os"
	"path/filepath"
)

// The extension that colours cells in JupyterLab and Notebook. It is plain
// JavaScript that needs no building; its folder goes beside those of the
// kernels.
//
//go:embed files/labextension
var extensionFiles embed.FS

const (
	extensionRoot = "files/labextension"
	extensionName = "adjoin-notation"
)

// extensionDir is where the extension goes.
func (t Target) extensionDir() string { return t.System.join(t.Data, "labextensions", extensionName) }

// installExtension writes the extension.
func (t Target) installExtension() (changed bool, err error) {
	root, err := fs.Sub(extensionFiles, extensionRoot)
	if err != nil {
		return false, err
	}
	err = fs.WalkDir(root, ".", func(path string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		to := filepath.Join(t.extensionDir(), filepath.FromSlash(path))
		if d.IsDir() {
			return os.MkdirAll(to, 0o755)
		}
		content, err := fs.ReadFile(root, path)
		if err != nil {
			return err
		}
		c, err := file{filepath.Base(to), content, 0o644}.write(filepath.Dir(to))
		changed = changed || c
		return err
	})
	return changed, err
}

// uninstallExtension removes the extension when no kernel of ours is left that
// needs it.
func (t Target) uninstallExtension() error {
	for _, k := range Find([]Place{{Path: t.Data}}) {
		if k.Err == nil && k.Spec.Ours() {
			return nil
		}
	}
	return os.RemoveAll(t.extensionDir())
}
