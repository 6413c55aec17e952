package vocabulary

import (
	"sort"
	"strings"
)

// Near lists up to three of the known words that are closest to the given
// ones, the closest first. Words that share nothing with them are left out.
func Near(words string, known []string) []string {
	type candidate struct {
		word     string
		distance int
	}
	var list []candidate
	seen := map[string]bool{}
	for _, k := range known {
		d := distance(strings.ToLower(words), strings.ToLower(k))
		close := d <= 1+min(len(words), len(k))/3 && d < len(words)
		if !seen[k] && k != words && (close || shares(words, k)) {
			seen[k] = true
			list = append(list, candidate{k, d})
		}
	}
	sort.Slice(list, func(i, j int) bool {
		if list[i].distance != list[j].distance {
			return list[i].distance < list[j].distance
		}
		return list[i].word < list[j].word
	})
	var near []string
	for _, c := range list[:min(len(list), 3)] {
		near = append(near, c.word)
	}
	return near
}

// shares says whether two phrases of several words have the same main word,
// which stands last in the trade's nouns.
func shares(a, b string) bool {
	x, y := strings.Fields(a), strings.Fields(b)
	if len(x)+len(y) < 3 {
		return false
	}
	return x[len(x)-1] == y[len(y)-1] || x[0] == y[0]
}

// distance is the least number of letters to insert, drop, change or swap with
// their neighbour that turns a into b (V. I. Levenshtein, Binary codes capable
// of correcting deletions, insertions, and reversals, 1966; the swap after
// F. J. Damerau, A technique for computer detection and correction of spelling
// errors, 1964).
func distance(a, b string) int {
	x, y := []rune(a), []rune(b)
	if len(x) > 80 || len(y) > 80 {
		return 80
	}
	before, last, row := make([]int, len(y)+1), make([]int, len(y)+1), make([]int, len(y)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(x); i++ {
		row[0] = i
		for j := 1; j <= len(y); j++ {
			cost := 1
			if x[i-1] == y[j-1] {
				cost = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+cost)
			if i > 1 && j > 1 && x[i-1] == y[j-2] && x[i-2] == y[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last, row = last, row, before
	}
	return last[len(y)]
}
