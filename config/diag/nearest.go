package diag

// Nearest returns the candidate that is most likely meant by a misspelt word:
// the one with the fewest letters added, dropped, changed or swapped, at most a
// third of the word (two for short ones); of equal ones the first; "" when none is
// near. A word of a single letter or of more than 64 is near to none.
func Nearest(word string, candidates []string) (best string) {
	letters := []rune(word)
	if len(letters) > longestName {
		return ""
	}
	least := 1 + max(len(letters)/3, min(2, len(letters)-1))
	for _, c := range candidates {
		if d := distance(letters, []rune(c)); d < least {
			best, least = c, d
		}
	}
	return best
}

// longestName is more letters than any name of a key, column or command has;
// comparing longer words letter by letter would take long for nothing.
const longestName = 64

// distance is the optimal string alignment distance (Damerau 1964,
// Levenshtein 1966).
func distance(a, b []rune) int {
	rows := make([][]int, len(a)+1)
	for i := range rows {
		rows[i] = make([]int, len(b)+1)
		rows[i][0] = i
	}
	for j := range rows[0] {
		rows[0][j] = j
	}
	for i := 1; i <= len(a); i++ {
		for j := 1; j <= len(b); j++ {
			cost := 1
			if a[i-1] == b[j-1] {
				cost = 0
			}
			d := min(rows[i-1][j]+1, rows[i][j-1]+1, rows[i-1][j-1]+cost)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				d = min(d, rows[i-2][j-2]+1)
			}
			rows[i][j] = d
		}
	}
	return rows[len(a)][len(b)]
}
