package vocabulary

import (
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/integer"
	"adjoin/algebra/ratpoly"
	"adjoin/eval/value"
)

var literals = []Entry{
	{
		Words: "polynomial", Class: Noun, Topic: "literals with a role",
		Meaning: "a polynomial read from a number or a list, the way of reading said: mask (bit i is the coefficient of x^i), exponents, octal (the digits of a mask in base 8), coefficients (constant term first), LaTeX",
		Source:  "R. C. Bose and D. K. Ray-Chaudhuri, On a class of error correcting binary group codes, 1960; octal tables after W. W. Peterson, Error-Correcting Codes, 1961",
		Cases: []Case{
			literal("mask", Integer, fromMask),
			literal("exponents", Several, fromExponents),
			literal("octal", Integer, fromOctal),
			literal("coefficients", Several, fromCoefficients),
			literal("LaTeX", Text, fromLaTeX),
		},
		Examples: []Example{
			{"polynomial from mask 0x11D over F_2", "x^8 + x^4 + x^3 + x^2 + 1 over F_2"},
			{"polynomial from exponents (8, 4, 3, 2, 0) over F_2", "x^8 + x^4 + x^3 + x^2 + 1 over F_2"},
			{"polynomial from octal 435 over F_2", "x^8 + x^4 + x^3 + x^2 + 1 over F_2"},
			{"polynomial from LaTeX \"x^{8}+x^{4}+1\" over F_2", "x^8 + x^4 + 1 over F_2"},
			{"polynomial from coefficients (1, 0, 2) over F_3", "2*x^2 + 1 over F_3"},
		},
	},
	{
		Words: "CRC polynomial", Class: Noun, Topic: "literals with a role",
		Meaning: "the generator polynomial of a cyclic redundancy check of width w, read from a number: normal (bit i is the coefficient of x^i, x^w left out), reflected (bit w-1-i is), reciprocal (the normal form of the reversed polynomial), implicit-one (bit i is the coefficient of x^(i+1), the constant 1 left out)",
		Source:  "P. Koopman and T. Chakravarty, Cyclic redundancy code (CRC) polynomial selection for embedded networks, 2004 (implicit +1 notation); common practice for the others",
		Cases: []Case{
			crc("normal", func(n *big.Int, w int) *big.Int { return withTop(n, w) }),
			crc("reflected", func(n *big.Int, w int) *big.Int { return withTop(reversed(n, w), w) }),
			crc("reciprocal", func(n *big.Int, w int) *big.Int { return reversed(withTop(n, w), w+1) }),
			crc("implicit-one", func(n *big.Int, w int) *big.Int {
				m := new(big.Int).Lsh(n, 1)
				return m.SetBit(m, 0, 1)
			}),
		},
		Examples: []Example{
			{"CRC polynomial from reflected 0x8408 of width 16", "x^16 + x^12 + x^5 + 1 over F_2"},
			{"CRC polynomial from normal 0x1021 of width 16", "x^16 + x^12 + x^5 + 1 over F_2"},
			{"CRC polynomial from reciprocal 0x0811 of width 16", "x^16 + x^12 + x^5 + 1 over F_2"},
			{"CRC polynomial from implicit-one 0x8810 of width 16", "x^16 + x^12 + x^5 + 1 over F_2"},
		},
	},
	{
		Words: "element", Class: Noun, Topic: "literals with a role",
		Meaning: "an element of K read from a number: bits (bit i is the coefficient of the i-th power of the generator, in characteristic 2), coordinates (constant term first), or bytes in an order that is said",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Field}, {Prep: "from", Role: "bits", Kind: Integer}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return elementFromBits(a[0].(value.Field).K, a[1].(value.Integer).N)
			}},
			{Args: []Arg{{Prep: "of", Kind: Field}, {Prep: "from", Role: "coordinates", Kind: Several}}, Do: elementFromCoordinates},
			{Args: []Arg{{Prep: "of", Kind: Field}, {Prep: "from", Role: "bytes", Kind: Text}, {Prep: "in", Role: "order", Kind: Text}}, Do: elementFromBytes},
		},
		Examples: []Example{
			{"let K = F_2(a) where a^8 = a^4 + a^3 + a + 1; element of K from bits 0x53", "a^6 + a^4 + a + 1"},
			{"let K = F_2(a) where a^8 = a^4 + a^3 + a + 1; element of K from coordinates (1, 1, 0, 0, 1, 0, 1, 0)", "a^6 + a^4 + a + 1"},
			{"let K = F_2(a) where a^128 = a^7 + a^2 + a + 1; element of K from bytes \"80000000 00000000 00000000 00000000\" in order \"first bit is the constant term\"", "1"},
		},
	},
}

// literal is one way to read a polynomial over F_2, or over the field said.
func literal(role string, k Kind, read func(c *value.Context, K *field.Field, v value.Value) (value.Value, error)) Case {
	return Case{
		Args: []Arg{{Prep: "from", Role: role, Kind: k}, {Prep: "over", Kind: Field}},
		Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return read(c, a[1].(value.Field).K, a[0])
		},
	}
}

func fromMask(c *value.Context, K *field.Field, v value.Value) (value.Value, error) {
	n := v.(value.Integer).N
	if n.Sign() < 0 {
		return nil, algebra.Errorf(algebra.Invalid, "a mask is not negative")
	}
	if K.Characteristic().Cmp(big.NewInt(2)) != 0 {
		return nil, algebra.Errorf(algebra.Invalid, "a mask writes one bit for each coefficient, and the coefficients in %s are not bits", value.Field{K: K}.Text(nil)).
			WithRemedy("polynomial from coefficients (...) takes them one by one")
	}
	if err := c.CheckDegree(big.NewInt(int64(n.BitLen()))); err != nil {
		return nil, err
	}
	list := make([]field.Elem, n.BitLen())
	for i := range list {
		list[i] = K.Int(big.NewInt(int64(n.Bit(i))))
	}
	return value.FieldPolynomial{P: field.NewPolynomial(K, list), Letter: "x"}, nil
}

func fromOctal(c *value.Context, K *field.Field, v value.Value) (value.Value, error) {
	digits := v.(value.Integer).N.String()
	n, ok := new(big.Int).SetString(digits, 8)
	if !ok {
		return nil, algebra.Errorf(algebra.Invalid, "%s has a digit that is not octal", digits)
	}
	return fromMask(c, K, value.Integer{N: n})
}

func fromExponents(c *value.Context, K *field.Field, v value.Value) (value.Value, error) {
	var list []field.Elem
	for _, x := range v.(value.Tuple).Items {
		n, ok := value.Plain(x).(value.Integer)
		if !ok || n.N.Sign() < 0 {
			return nil, algebra.Errorf(algebra.Invalid, "an exponent is an integer that is not negative")
		}
		if err := c.CheckDegree(n.N); err != nil {
			return nil, err
		}
		i := int(n.N.Int64())
		for len(list) <= i {
			list = append(list, K.Zero())
		}
		if !list[i].IsZero() {
			return nil, algebra.Errorf(algebra.Invalid, "the exponent %d appears twice", i)
		}
		list[i] = K.One()
	}
	return value.FieldPolynomial{P: field.NewPolynomial(K, list), Letter: "x"}, nil
}

func fromCoefficients(c *value.Context, K *field.Field, v value.Value) (value.Value, error) {
	list, err := elementsIn(c, value.List{Items: v.(value.Tuple).Items}, K)
	if err != nil {
		return nil, err
	}
	return value.FieldPolynomial{P: field.NewPolynomial(K, list), Letter: "x"}, nil
}

// fromLaTeX reads a sum of terms such as 3x^{8}, x, -1 in one letter.
func fromLaTeX(c *value.Context, K *field.Field, v value.Value) (value.Value, error) {
	text := strings.NewReplacer(" ", "", "{", "", "}", "", `\,`, "", `\cdot`, "", "*", "", "$", "").Replace(v.(value.Text).S)
	bad := func() (value.Value, error) {
		return nil, algebra.Errorf(algebra.Invalid, "%s is not a sum of terms in one letter", v.Text(nil))
	}
	letter, list := "", []*big.Rat(nil)
	for i := 0; i < len(text); {
		sign := int64(1)
		if text[i] == '+' || text[i] == '-' {
			if text[i] == '-' {
				sign = -1
			}
			i++
		} else if i > 0 {
			return bad()
		}
		number := digits(text[i:])
		i += len(number)
		coefficient, exponent := big.NewInt(1), 0
		if number != "" {
			coefficient.SetString(number, 10)
		}
		if i < len(text) && text[i] >= 'A' && text[i] <= 'z' && text[i] != '^' {
			if letter != "" && text[i:i+1] != letter {
				return bad()
			}
			letter = text[i : i+1]
			i++
			exponent = 1
			if i < len(text) && text[i] == '^' {
				e := digits(text[i+1:])
				i += 1 + len(e)
				n, ok := new(big.Int).SetString(e, 10)
				if !ok {
					return bad()
				}
				if err := c.CheckDegree(n); err != nil {
					return nil, err
				}
				exponent = int(n.Int64())
			}
		} else if number == "" {
			return bad()
		}
		for len(list) <= exponent {
			list = append(list, new(big.Rat))
		}
		list[exponent].Add(list[exponent], new(big.Rat).SetInt(coefficient.Mul(coefficient, big.NewInt(sign))))
	}
	if len(list) == 0 {
		return bad()
	}
	if letter == "" {
		letter = "x"
	}
	return value.Over(c, value.Polynomial{P: ratpoly.New(list), Letter: letter}, value.Field{K: K})
}

func digits(s string) string {
	i := 0
	for i < len(s) && s[i] >= '0' && s[i] <= '9' {
		i++
	}
	return s[:i]
}

func crc(role string, mask func(n *big.Int, w int) *big.Int) Case {
	return Case{
		Args: []Arg{{Prep: "from", Role: role, Kind: Integer}, {Prep: "of", Role: "width", Kind: Natural}},
		Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			n, width := a[0].(value.Integer).N, a[1].(value.Integer).N
			if err := c.CheckDegree(width); err != nil {
				return nil, err
			}
			w := int(width.Int64())
			if n.Sign() < 0 || n.BitLen() > w {
				return nil, algebra.Errorf(algebra.Invalid, "%s does not fit into %d bits", n, w)
			}
			m := mask(n, w)
			if m.Bit(0) == 0 || m.BitLen() != w+1 {
				return nil, algebra.Errorf(algebra.Invalid, "read as %s, 0x%X is not the polynomial of a check of width %d: its degree would be %d and its constant term %d", role, n, w, m.BitLen()-1, m.Bit(0)).
					WithRemedy("normal, reflected, reciprocal and implicit-one are the four ways of reading")
			}
			K, err := field.Prime(c.W, big.NewInt(2))
			if err != nil {
				return nil, err
			}
			return fromMask(c, K, value.Integer{N: m})
		},
	}
}

func withTop(n *big.Int, w int) *big.Int { return new(big.Int).SetBit(n, w, 1) }

// reversed reverses the lowest w bits of n.
func reversed(n *big.Int, w int) *big.Int {
	r := new(big.Int)
	for i := range w {
		r.SetBit(r, w-1-i, n.Bit(i))
	}
	return r
}

func elementFromBits(K *field.Field, n *big.Int) (value.Value, error) {
	if K.Characteristic().Cmp(big.NewInt(2)) != 0 {
		return nil, algebra.Errorf(algebra.Invalid, "bits are the coordinates of an element in characteristic 2 only, and %s has characteristic %s", value.Field{K: K}.Text(nil), K.Characteristic()).
			WithRemedy("element of K from coordinates (...) takes them one by one")
	}
	if n.Sign() < 0 || n.BitLen() > K.AbsoluteDegree() {
		return nil, algebra.Errorf(algebra.Invalid, "an element of %s has %d bits, and this number has %d", value.Field{K: K}.Text(nil), K.AbsoluteDegree(), n.BitLen())
	}
	return value.Element{E: K.Element(n)}, nil
}

func elementFromCoordinates(c *value.Context, a []value.Value) (value.Value, error) {
	K, items := a[0].(value.Field).K, a[1].(value.Tuple).Items
	if K.IsPrime() {
		return nil, algebra.Errorf(algebra.Invalid, "an element of a prime field has no coordinates: write n over F_p")
	}
	if len(items) != K.Degree() {
		return nil, algebra.Errorf(algebra.Invalid, "an element of %s has %d coordinates, not %d", value.Field{K: K}.Text(nil), K.Degree(), len(items))
	}
	list, err := elementsIn(c, value.List{Items: items}, K.Base())
	if err != nil {
		return nil, err
	}
	return value.Element{E: K.FromCoordinates(list)}, nil
}

// Orders of the bits in a string of bytes.
const (
	constantFirst = "first bit is the constant term"
	constantLast  = "last bit is the constant term"
)

// elementFromBytes reads hexadecimal bytes. In each byte the first bit is the
// most significant one, as in the standards that print bytes so.
func elementFromBytes(c *value.Context, a []value.Value) (value.Value, error) {
	K := a[0].(value.Field).K
	digits := strings.Join(strings.Fields(a[1].(value.Text).S), "")
	n, ok := new(big.Int).SetString(digits, 16)
	if !ok || strings.ContainsAny(digits, "+-_") || len(digits)%2 == 1 {
		return nil, algebra.Errorf(algebra.Invalid, "bytes are written with two hexadecimal digits each")
	}
	bits := 4 * len(digits)
	switch a[2].(value.Text).S {
	case constantLast:
	case constantFirst:
		n = reversed(n, bits)
	default:
		return nil, algebra.Errorf(algebra.Invalid, "the order %s is not known", a[2].Text(nil)).
			WithRemedy("the orders are %q, as in the counter mode with authentication of SP 800-38D, and %q, as in FIPS 197", constantFirst, constantLast)
	}
	return elementFromBits(K, n)
}

func orderMod(c *value.Context, a, m *big.Int) (*big.Int, error) { return integer.OrderMod(c.W, a, m) }
