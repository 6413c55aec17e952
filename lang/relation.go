package lang

// relation reads the relation behind its first term: a chain of relations, a
// predicate, or a residue.
func (p *parser) relation(start int, x Expr) Expr {
	if p.isWord(0, "mod") {
		p.next()
		n := p.binary(pSum)
		x = &Residue{p.place(start, x, n), x, n}
		if _, bind := p.operator(); bind != pRelation || p.isWord(0, "mod") {
			return x
		}
	}
	if p.isWord(0, "is") && !p.isIn(1) && !(p.isWord(1, "not") && p.isIn(2)) || p.peek().Type == tName && !p.isDoesNotDivide() {
		return p.predicate(start, x)
	}
	return p.chain(start, x, false)
}

// chain reads the relations behind x. With equations only, it stops at
// anything but =.
func (p *parser) chain(start int, x Expr, equations bool) Expr {
	terms, ops := []Expr{x}, []string(nil)
	for {
		op := p.relator(equations)
		if op == "" {
			break
		}
		ops = append(ops, op)
		terms = append(terms, p.binary(pRelation+1))
	}
	r := &Relation{Terms: terms, Ops: ops}
	if p.isWord(0, "mod") {
		p.next()
		r.Mod = p.binary(pSum)
		terms = append(terms[:len(terms):len(terms)], r.Mod)
	}
	r.at = p.place(start, terms...)
	return r
}

// relator reads the next sign of a chain, if one comes.
func (p *parser) relator(equations bool) string {
	t := p.peek()
	if equations {
		if p.isOp("=") {
			p.next()
			return "="
		}
		return ""
	}
	switch {
	case p.isWord(0, "is") && p.isIn(1):
		p.next()
		p.next()
		return "in"
	case p.isWord(0, "is") && p.isWord(1, "not") && p.isIn(2):
		p.next()
		p.next()
		p.next()
		return "not in"
	case p.isWord(0, "not") && p.isIn(1):
		p.next()
		p.next()
		return "not in"
	case p.isDoesNotDivide():
		p.next()
		p.next()
		p.next()
		return "does not divide"
	}
	if t.Type != tOp && t.Type != tKeyword {
		return ""
	}
	switch op := plain(t); op {
	case "=", "!=", "<", "<=", ">", ">=", "in", "not in", "divides":
		p.next()
		return op
	}
	return ""
}

func (p *parser) isDoesNotDivide() bool {
	return p.isWord(0, "does") && p.isWord(1, "not") && p.isWord(2, "divide")
}

// predicate reads is [not] [a] WORDS, or a verb, and the objects behind it.
func (p *parser) predicate(start int, x Expr) Expr {
	node := &Predicate{X: x}
	var e entry
	length := 0
	if p.isWord(0, "is") {
		p.next()
		if node.Not = p.isWord(0, "not"); node.Not {
			p.next()
		}
		if p.ahead(1).Type == tName && (p.isWord(0, "a") || p.isWord(0, "an") || p.isWord(0, "the")) {
			node.Article = p.next().Value
		}
		e = p.predicateWords()
		length = len(e.tokens)
	} else {
		e, length, node.Not = p.verb(0)
		node.Verb = true
	}
	node.Words = e.words
	p.skip(length)
	if last := node.Words[len(node.Words)-1]; prepositions[last] {
		node.Args = append(node.Args, p.arg("", last))
	}
	node.Args = p.args(node.Args)
	node.at = p.placeArgs(start, x, node.Args)
	return node
}

// predicateWords is the longest predicate of the lexicon that comes next, or
// else the run of words, so that the evaluator can say what is near.
func (p *parser) predicateWords() entry {
	if e, ok := p.match(p.words.predicates, 0); ok {
		return e
	}
	var e entry
	for len(e.tokens) < maxRun && p.ahead(len(e.tokens)).Type == tName {
		word := plain(p.ahead(len(e.tokens)))
		e.tokens = append(e.tokens, word)
		e.words = append(e.words, word)
	}
	if len(e.words) == 0 {
		p.failUnlessEnd("after is stands what it is", "write is prime, is a field; equality is written =")
	}
	return e
}
