package spectrum

// SetCycleLimit sets the limit of the cycles that are gone round.
func SetCycleLimit(n int) int {
	old := cycleLimit
	cycleLimit = n
	return old
}
