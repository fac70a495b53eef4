package contfrac

import (
	"fmt"
	"math/big"
	"strconv"
)

const (
	// abbreviateFrom is the number of digits past which Abbreviate shortens.
	abbreviateFrom = 40
	// abbreviateKeep is the number of digits it keeps at either end.
	abbreviateKeep = 12
)

// Abbreviate writes n in decimal, shortened when it has more than 40 digits
// to the first and the last twelve and the digit count, as in
// "141421356237…356237309504 (301 digits)". It costs some multiplications of
// the size of n, much less than writing n in full. A nil n is written as "nil".
func Abbreviate(n *big.Int) string {
	if n == nil {
		return "nil"
	}
	if n.BitLen() < 128 {
		if s := n.String(); len(s) <= abbreviateFrom {
			return s
		}
	}
	abs := new(big.Int).Abs(n)
	// 30102/100000 is a little under log₁₀ 2, so head has the digits to keep
	// and some more, of which there are few as long as n has few digits.
	digits := int(int64(abs.BitLen()) * 30102 / 100000)
	drop := max(digits-abbreviateKeep, 0)
	head := new(big.Int).Quo(abs, powerOfTen(drop)).String()
	digits = drop + len(head)
	if digits <= abbreviateFrom {
		return n.String()
	}
	tail := new(big.Int).Rem(abs, powerOfTen(abbreviateKeep))
	sign := ""
	if n.Sign() < 0 {
		sign = "-"
	}
	return fmt.Sprintf("%s%s…%012s (%d digits)", sign, head[:abbreviateKeep], tail.String(), digits)
}

// powerOfTen returns 10^n by squarings that go through Product.
func powerOfTen(n int) *big.Int {
	if n < 64 {
		return new(big.Int).Exp(big.NewInt(10), big.NewInt(int64(n)), nil)
	}
	h := powerOfTen(n / 2)
	h = Product(h, h)
	if n%2 == 1 {
		h.Mul(h, big.NewInt(10))
	}
	return h
}

// quote quotes s for an error message, shortened when it is long.
func quote(s string) string {
	const most = 48
	if len(s) > most {
		return strconv.Quote(s[:most]) + fmt.Sprintf("… (%d bytes)", len(s))
	}
	return strconv.Quote(s)
}

// decimal reads an integer written exactly as (*big.Int).String writes it.
func decimal(s string) (*big.Int, error) {
	digits := s
	if digits != "" && digits[0] == '-' {
		digits = digits[1:]
	}
	if len(digits) > MaxDigits {
		return nil, fmt.Errorf("integer %s has %d digits: at most %d are accepted: %w", quote(s), len(digits), MaxDigits, ErrTooLarge)
	}
	good := digits != "" && (digits[0] != '0' || s == "0")
	for i := 0; i < len(digits) && good; i++ {
		good = '0' <= digits[i] && digits[i] <= '9'
	}
	if !good {
		return nil, fmt.Errorf("%s is not an integer: decimal digits without leading zeros, after an optional '-', are accepted: %w", quote(s), ErrSyntax)
	}
	n := fromDigits(digits)
	if len(digits) < len(s) {
		n.Neg(n)
	}
	return n, nil
}

// fromDigitsSize is the number of digits up to which the quadratic method of
// math/big reads a decimal; see BenchmarkFromDigits.
var fromDigitsSize = 3000

// fromDigits returns the value of a string of decimal digits.
func fromDigits(s string) *big.Int {
	if len(s) <= fromDigitsSize {
		n, _ := new(big.Int).SetString(s, 10)
		return n
	}
	low := len(s) / 2
	n := Product(fromDigits(s[:len(s)-low]), powerOfTen(low))
	return n.Add(n, fromDigits(s[len(s)-low:]))
}

// checkText refuses texts that are longer than MaxText.
func checkText(what string, n int) error {
	if n > MaxText {
		return fmt.Errorf("contfrac: %s of %d bytes: at most %d are accepted: %w", what, n, MaxText, ErrTooLarge)
	}
	return nil
}
