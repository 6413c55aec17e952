package lang

// Print writes a statement or an expression in canonical spacing and ASCII
// spelling. Parsed again with the same Lexicon, the text gives the same tree
// up to spans. Parentheses are kept, and added only where the tree could not
// be written without them.
func Print(n Node) string { panic("to come") }
