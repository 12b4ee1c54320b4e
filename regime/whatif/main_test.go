package whatif

import (
	"flag"
	"os"
	"testing"
)

// TestMain fixes what rapid draws, so that a run is the same every time.
// -rapid.seed and -rapid.checks on the command line still go first.
func TestMain(m *testing.M) {
	flag.Parse()
	own := map[string]bool{}
	flag.Visit(func(f *flag.Flag) { own[f.Name] = true })
	for name, value := range map[string]string{"rapid.seed": "20260412", "rapid.checks": "100", "rapid.nofailfile": "true"} {
		if !own[name] {
			if err := flag.Set(name, value); err != nil {
				panic(err)
			}
		}
	}
	os.Exit(m.Run())
}
