package snake

// SetPackedLimit sets the threshold of polynomial multiplication and returns
// what sets it back.
func SetPackedLimit(words int) func() {
	old := packedLimit
	packedLimit = words
	return func() { packedLimit = old }
}

// SetLayoutNow sets the length up to which words are laid out at once and
// returns what sets it back.
func SetLayoutNow(tiles int) func() {
	old := layoutNow
	layoutNow = tiles
	return func() { layoutNow = old }
}
