package lang

// Parse reads the text of a cell: its statements in order, or the first fault
// in the text. It never panics and takes time linear in the length of src.
// A cell that is blank or all comment has no statements and no fault.
func Parse(src string, lex *Lexicon) ([]Stmt, *Error) { panic("to come") }

// ParseExpr reads one expression and nothing else.
func ParseExpr(src string, lex *Lexicon) (Expr, *Error) { panic("to come") }
