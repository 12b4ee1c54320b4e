package similar_test

import (
	"flag"
	"os"
	"testing"
)

// TestMain fixes what rapid draws, so that a run gives the same cases every
// time. -rapid.seed and -rapid.checks on the command line still go first.
func TestMain(m *testing.M) {
	flag.Parse()
	own := map[string]bool{}
	flag.Visit(func(f *flag.Flag) { own[f.Name] = true })
	for name, value := range map[string]string{"rapid.seed": "20260302", "rapid.checks": "150", "rapid.nofailfile": "true"} {
		if !own[name] {
			if err := flag.Set(name, value); err != nil {
				panic(err)
			}
		}
	}
	os.Exit(m.Run())
}
