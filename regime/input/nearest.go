package input

import (
	"fmt"
	"strings"
)

// unknown says that a name is not known, and which known names are near to it.
func unknown(what, name string, known []string) string {
	if len(name) > 60 {
		name = "(a long name)"
	}
	near := Nearest(name, known)
	if len(near) == 0 {
		return fmt.Sprintf("No %s is called %q; known are %s.", what, name, OrList(known))
	}
	return fmt.Sprintf("No %s is called %q. Did you mean %s?", what, name, OrList(near))
}

// Nearest returns the known names that differ least from a name, at most three.
func Nearest(name string, known []string) []string {
	most := 1 + len(name)/3
	if most > 4 {
		most = 4
	}
	var near []string
	for distance := 0; distance <= most && len(near) == 0; distance++ {
		for _, k := range known {
			if editDistance(strings.ToLower(name), strings.ToLower(k), most) == distance && len(near) < 3 {
				near = append(near, k)
			}
		}
	}
	if len(near) > 0 {
		return near
	}
	for _, k := range known {
		if len(name) > 2 && strings.Contains(k, strings.ToLower(name)) && len(near) < 3 {
			near = append(near, k)
		}
	}
	return near
}

// editDistance is the number of letters to insert, remove, change or swap with
// their neighbour; most+1 where it is more than most.
func editDistance(a, b string, most int) int {
	if d := len(a) - len(b); d > most || -d > most {
		return most + 1
	}
	rows := [3][]int{make([]int, len(b)+1), make([]int, len(b)+1), make([]int, len(b)+1)}
	for j := range rows[1] {
		rows[1][j] = j
	}
	for i := 1; i <= len(a); i++ {
		cur, prev, before := rows[(i+1)%3], rows[i%3], rows[(i+2)%3]
		cur[0] = i
		for j := 1; j <= len(b); j++ {
			cost := 1
			if a[i-1] == b[j-1] {
				cost = 0
			}
			cur[j] = min(prev[j]+1, cur[j-1]+1, prev[j-1]+cost)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				cur[j] = min(cur[j], before[j-2]+1)
			}
		}
	}
	return rows[(len(a)+1)%3][len(b)]
}

// OrList joins names: "a, b or c".
func OrList(list []string) string {
	if len(list) < 2 {
		return strings.Join(list, "")
	}
	return strings.Join(list[:len(list)-1], ", ") + " or " + list[len(list)-1]
}
