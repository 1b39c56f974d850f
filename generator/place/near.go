package place

// Near finds the word of known that a typo was probably meant for: at most a
// third of its letters differ. "" when none is near.
func Near(word string, known []string) string {
	best, least := "", 1000
	for _, k := range known {
		d := distance([]rune(word), []rune(k))
		if d < least {
			best, least = k, d
		}
	}
	if best == "" || least > max(1, len([]rune(best))/3) || least >= len([]rune(word)) {
		return ""
	}
	return best
}

// distance counts insertions, deletions, changes and swaps of neighbours that
// turn a into b (optimal string alignment).
func distance(a, b []rune) int {
	rows := [3][]int{make([]int, len(b)+1), make([]int, len(b)+1), make([]int, len(b)+1)}
	before, last, now := rows[0], rows[1], rows[2]
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(a); i++ {
		now[0] = i
		for j := 1; j <= len(b); j++ {
			cost := 1
			if a[i-1] == b[j-1] {
				cost = 0
			}
			now[j] = min(last[j]+1, now[j-1]+1, last[j-1]+cost)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				now[j] = min(now[j], before[j-2]+1)
			}
		}
		before, last, now = last, now, before
	}
	return last[len(b)]
}
