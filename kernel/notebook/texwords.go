package notebook

// The words of TeX that are known, and what they are in Unicode.

var texLetters = map[string]string{
	"alpha": "α", "beta": "β", "gamma": "γ", "delta": "δ", "epsilon": "ϵ", "varepsilon": "ε", "zeta": "ζ", "eta": "η",
	"theta": "θ", "vartheta": "ϑ", "iota": "ι", "kappa": "κ", "lambda": "λ", "mu": "μ", "nu": "ν", "xi": "ξ", "pi": "π",
	"rho": "ρ", "sigma": "σ", "tau": "τ", "upsilon": "υ", "phi": "ϕ", "varphi": "φ", "chi": "χ", "psi": "ψ", "omega": "ω",
	"Gamma": "Γ", "Delta": "Δ", "Theta": "Θ", "Lambda": "Λ", "Xi": "Ξ", "Pi": "Π", "Sigma": "Σ", "Phi": "Φ", "Psi": "Ψ", "Omega": "Ω",
	"infty": "∞", "ell": "ℓ", "emptyset": "∅", "varnothing": "∅",
}

var texOperators = map[string]string{
	"cdot": "·", "times": "×", "div": "÷", "pm": "±", "mp": "∓", "circ": "∘", "ast": "∗", "star": "⋆", "oplus": "⊕", "otimes": "⊗",
	"le": "≤", "leq": "≤", "ge": "≥", "geq": "≥", "ne": "≠", "neq": "≠", "equiv": "≡", "cong": "≅", "simeq": "≃", "sim": "∼", "approx": "≈",
	"in": "∈", "notin": "∉", "ni": "∋", "subset": "⊂", "subseteq": "⊆", "supset": "⊃", "supseteq": "⊇", "cup": "∪", "cap": "∩", "setminus": "∖",
	"mapsto": "↦", "longmapsto": "⟼", "to": "→", "rightarrow": "→", "longrightarrow": "⟶", "leftarrow": "←", "hookrightarrow": "↪",
	"leftrightarrow": "↔", "Rightarrow": "⇒", "Leftarrow": "⇐", "Leftrightarrow": "⇔", "iff": "⟺", "implies": "⟹",
	"mid": "∣", "nmid": "∤", "parallel": "∥", "colon": ":", "prime": "′", "ldots": "…", "dots": "…", "cdots": "⋯", "vdots": "⋮", "ddots": "⋱",
	"sum": "∑", "prod": "∏", "forall": "∀", "exists": "∃", "neg": "¬", "land": "∧", "lor": "∨", "wedge": "∧", "vee": "∨", "triangleleft": "◁",
	"#": "#", "%": "%", "&": "&amp;", "_": "_", "$": "$",
}

var texFences = map[string]string{
	"{": "{", "}": "}", "lbrace": "{", "rbrace": "}", "langle": "⟨", "rangle": "⟩", "lfloor": "⌊", "rfloor": "⌋", "lceil": "⌈", "rceil": "⌉",
	"vert": "|", "Vert": "‖", "|": "‖", "lvert": "|", "rvert": "|",
}

var texSpaces = map[string]string{
	",": "0.17em", ":": "0.22em", ">": "0.22em", ";": "0.28em", "!": "-0.17em", " ": "0.33em", "quad": "1em", "qquad": "2em",
}

var texFunctions = map[string]bool{
	"gcd": true, "deg": true, "dim": true, "ker": true, "log": true, "det": true, "min": true, "max": true, "exp": true, "sin": true, "cos": true, "lim": true, "hom": true,
}

// texEnvironments are those that are tables, with what stands before and after.
var texEnvironments = map[string][2]string{
	"array": {}, "matrix": {}, "smallmatrix": {}, "aligned": {}, "gathered": {}, "align": {},
	"pmatrix": {"<mo>(</mo>", "<mo>)</mo>"},
	"bmatrix": {"<mo>[</mo>", "<mo>]</mo>"},
	"vmatrix": {"<mo>|</mo>", "<mo>|</mo>"},
	"cases":   {"<mo>{</mo>", ""},
}
