package kernelspec

import (
	"bytes"
	_ "embed"
	"encoding/json"
)

// What the installed files are.
const (
	DefaultName        = "adjoin"
	DefaultDisplayName = "Adjoin"
	language           = "adjoin"
)

//go:embed files/kernel.json
var template []byte

//go:embed files/logo-32x32.png
var logo32 []byte

//go:embed files/logo-64x64.png
var logo64 []byte

//go:embed files/logo-svg.svg
var logoSVG []byte

// Spec is the content of a kernel.json.
type Spec struct {
	Argv            []string                  `json:"argv"`
	DisplayName     string                    `json:"display_name"`
	Language        string                    `json:"language"`
	InterruptMode   string                    `json:"interrupt_mode"`
	ProtocolVersion string                    `json:"kernel_protocol_version"`
	Env             map[string]string         `json:"env"`
	Metadata        map[string]map[string]any `json:"metadata"`
}

// newSpec is the template, filled in: program is what starts the kernel.
func newSpec(program, displayName, version string) (Spec, error) {
	var s Spec
	if err := json.Unmarshal(template, &s); err != nil {
		return s, err
	}
	s.Argv[0] = program
	s.DisplayName = displayName
	s.Metadata[language]["version"] = version
	return s, nil
}

// Ours says whether a kernel.json was written here.
func (s Spec) Ours() bool {
	_, ok := s.Metadata[language]
	return s.Language == language && ok
}

// Version is that of the program that wrote the kernel.json.
func (s Spec) Version() string {
	v, _ := s.Metadata[language]["version"].(string)
	return v
}

func (s Spec) encode() ([]byte, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	err := e.Encode(s)
	return b.Bytes(), err
}
