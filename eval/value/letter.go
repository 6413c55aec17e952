package value

import (
	"sort"
	"strings"
	"unicode"
	"unicode/utf8"
)

// IsLetter says whether a name that nothing binds is an indeterminate: a
// single lower-case letter, perhaps with a number as its index.
func IsLetter(name string) bool {
	r, size := utf8.DecodeRuneInString(name)
	if !unicode.IsLower(r) {
		return false
	}
	rest := name[size:]
	if rest == "" {
		return true
	}
	index, ok := strings.CutPrefix(rest, "_")
	return ok && index != "" && strings.Trim(index, "0123456789") == ""
}

var greek = map[string]string{
	"α": `\alpha`, "β": `\beta`, "γ": `\gamma`, "δ": `\delta`, "ε": `\varepsilon`, "ζ": `\zeta`, "η": `\eta`, "θ": `\theta`,
	"ι": `\iota`, "κ": `\kappa`, "λ": `\lambda`, "μ": `\mu`, "ν": `\nu`, "ξ": `\xi`, "π": `\pi`, "ρ": `\rho`, "σ": `\sigma`,
	"τ": `\tau`, "υ": `\upsilon`, "φ": `\varphi`, "χ": `\chi`, "ψ": `\psi`, "ω": `\omega`,
	"Γ": `\Gamma`, "Δ": `\Delta`, "Θ": `\Theta`, "Λ": `\Lambda`, "Ξ": `\Xi`, "Π": `\Pi`, "Σ": `\Sigma`, "Φ": `\Phi`, "Ψ": `\Psi`, "Ω": `\Omega`,
}

// LetterTeX typesets a name: a letter with its index and primes in
// mathematical italics, a longer word upright.
func LetterTeX(name string) string {
	body := strings.TrimRight(name, "'")
	primes := name[len(body):]
	head, index, _ := strings.Cut(body, "_")
	if t, ok := greek[head]; ok {
		head = t
	} else if utf8.RuneCountInString(head) > 1 {
		head = `\mathrm{` + head + `}`
	}
	if index != "" {
		index = strings.Trim(strings.ReplaceAll(index, "_", `\_`), "{}")
		if base, exponent, ok := strings.Cut(index, "^"); ok {
			index = base + "^{" + exponent + "}"
		}
		head += "_{" + index + "}"
	}
	return head + primes
}

// GreekLetter is a letter and its name.
type GreekLetter struct{ Name, Letter string }

// Greek lists the Greek letters by name.
func Greek() []GreekLetter {
	var list []GreekLetter
	for letter, tex := range greek {
		list = append(list, GreekLetter{strings.TrimPrefix(strings.Replace(tex, "var", "", 1), `\`), letter})
	}
	sort.Slice(list, func(i, j int) bool { return list[i].Name < list[j].Name })
	return list
}
