package contfrac

import (
	"fmt"
	"strconv"
	"strings"
)

// format is the fmt.Formatter of the types that hold integers of any size: %s
// and %q in full, %v shortened.
func format(f fmt.State, verb rune, name string, whole, shortened func() string) {
	var s string
	switch verb {
	case 's':
		s = whole()
	case 'q':
		s = strconv.Quote(whole())
	case 'v':
		s = shortened()
	default:
		s = fmt.Sprintf("%%!%c(%s=%s)", verb, name, shortened())
	}
	if width, ok := f.Width(); ok {
		flag := ""
		if f.Flag('-') {
			flag = "-"
		}
		fmt.Fprintf(f, "%"+flag+"*s", width, s)
		return
	}
	_, _ = f.Write([]byte(s))
}

// elideKeep is the number of items that elide shows at either end.
const elideKeep = 6

// elide joins the n items of a packed sequence, leaving out the middle ones
// when there are many.
func elide(n int, sep string, item func(i int, packed string) string, data string) string {
	var parts []string
	i, at := 0, 0
	for ; at < len(data) && (i < elideKeep || n <= 2*elideKeep); i++ {
		end := packedEnd(data, at)
		parts = append(parts, item(i, data[at:end]))
		at = end
	}
	if i < n {
		parts = append(parts, "…")
		start := len(data)
		for range elideKeep {
			start = packedStart(data, start)
		}
		for i = n - elideKeep; i < n; i++ {
			end := packedEnd(data, start)
			parts = append(parts, item(i, data[start:end]))
			start = end
		}
	}
	return strings.Join(parts, sep)
}

// appendNumber appends the decimal form of one packed number.
func appendNumber(buf []byte, packed string) []byte {
	if n, ok := packedUint(packed); ok {
		return strconv.AppendUint(buf, n, 10)
	}
	return packedBig(packed).Append(buf, 10)
}
