package main

import (
	"bufio"
	"context"
	"crypto/sha256"
	"database/sql"
	"fmt"
	"io"
	"math/rand/v2"
	"net/http"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/go-json-experiment/json"

	"regimed/api/store"
)

// asProgram is the variable that makes the test's own binary the program
// itself, with the arguments that it holds, one a line.
const asProgram = "REGIMED_TEST_ARGUMENTS"

func TestMain(m *testing.M) {
	if arguments := os.Getenv(asProgram); arguments != "" {
		os.Exit(run(strings.Split(arguments, "\n"), os.Stdin, os.Stdout, os.Stderr))
	}
	os.Exit(m.Run())
}

// life is one life of a server, from its start to its violent end.
type life struct {
	process *exec.Cmd
	address string
}

// start starts the server as a process of its own.
func start(ctx context.Context, t *testing.T, dir string) *life {
	t.Helper()
	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	p := exec.CommandContext(ctx, self)
	p.Env = append(os.Environ(), asProgram+"="+strings.Join([]string{"serve", "--listen", "127.0.0.1:0", "--drain", "0s", "--data", dir}, "\n"))
	out, err := p.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := p.Start(); err != nil {
		t.Fatal(err)
	}
	line, err := bufio.NewReader(out).ReadString('\n')
	address, found := strings.CutPrefix(strings.TrimSpace(line), "listening on ")
	if err != nil || !found {
		t.Fatalf("the server printed %q: %v", line, err)
	}
	return &life{p, address}
}

// kill ends the process as a failing machine does: without a word.
func (l *life) kill(t *testing.T) {
	t.Helper()
	if err := l.process.Process.Kill(); err != nil {
		t.Error(err)
	}
	_ = l.process.Wait() // says that it was killed
}

// ledger is what was acknowledged: the digest of each record by its path.
type ledger struct {
	mutex sync.Mutex
	kept  map[string][sha256.Size]byte
	fresh []string // since the last check
}

// add notes a record, and returns how many came since the last check.
func (l *ledger) add(path string, body []byte) int {
	l.mutex.Lock()
	defer l.mutex.Unlock()
	l.kept[path] = sha256.Sum256(body)
	l.fresh = append(l.fresh, path)
	return len(l.fresh)
}

const (
	crashWriters = 8
	crashKills   = 25
	crashWrites  = 10_000 // acknowledged, in all lives together
	crashChecked = 60     // after each start: those acknowledged last before the kill
)

// What was acknowledged is there after the process was killed at any moment,
// with every byte. Writers post varied cases, the server is killed in the midst,
// started again on the same directory, and asked for the last ones, which are at
// most risk; in the end for all of them.
func TestKilledServerLosesNothing(t *testing.T) {
	ctx, cancel := context.WithTimeout(context.Background(), 6*time.Minute)
	defer cancel()
	dir := t.TempDir()
	book := &ledger{kept: map[string][sha256.Size]byte{}}
	client := &http.Client{Transport: &http.Transport{MaxIdleConnsPerHost: crashWriters}}
	began, kills, unanswered := time.Now(), 0, 0
	for kills < crashKills || len(book.kept) < crashWrites {
		server := start(ctx, t, dir)
		latest := book.fresh[max(len(book.fresh)-crashChecked, 0):]
		if n := checkAll(t, client, server.address, book, latest); n > 0 {
			t.Fatalf("%d of the last %d acknowledged records were lost by kill %d", n, len(latest), kills)
		}
		book.fresh = nil
		unanswered += writeUntilKilled(t, client, server, kills, 300+rand.IntN(300), book)
		kills++
	}
	server := start(ctx, t, dir)
	defer server.kill(t)
	var every []string
	for path := range book.kept {
		every = append(every, path)
	}
	if n := checkAll(t, client, server.address, book, every); n > 0 {
		t.Errorf("%d of %d acknowledged records were lost in the end", n, len(every))
	}
	checkFile(t, dir, len(book.kept), len(book.kept)+unanswered)
	t.Logf("%d kills, %d acknowledged records, %d requests cut off, %.0f s", kills, len(book.kept), unanswered, time.Since(began).Seconds())
}

// writeUntilKilled posts cases from several writers until enough are
// acknowledged, kills the server while others are on their way, and returns how
// many got no answer.
func writeUntilKilled(t *testing.T, client *http.Client, server *life, round, enough int, book *ledger) int {
	t.Helper()
	var all sync.WaitGroup
	var once sync.Once
	cut := make([]int, crashWriters)
	for w := range crashWriters {
		all.Go(func() {
			for i := 0; ; i++ {
				path, body, err := postRecord(client, server.address, variedCase(round, w, i))
				if err != nil {
					cut[w]++
					return // it is dead
				}
				if path == "" {
					t.Errorf("refused: %.300s", body)
					return
				}
				if book.add(path, body) >= enough {
					once.Do(func() { server.kill(t) })
				}
			}
		})
	}
	all.Wait()
	once.Do(func() { server.kill(t) }) // where all writers were refused
	sum := 0
	for _, n := range cut {
		sum += n
	}
	return sum
}

// variedCase is a case that no other writer or life posts; every tenth is one
// that was posted before.
func variedCase(round, writer, i int) string {
	if i%10 == 9 {
		i--
	}
	diameter := 0.1 + float64(writer)/100 + float64(round)/10_000 + float64(i)/100_000_000
	return fmt.Sprintf(`{"case": {"structure": {"kind": "cylinder", "diameter": "%.10f m", "mass_per_length": "180 kg/m", "frequency_dry": "1.2 Hz"},
		"fluid": "seawater", "flow": {"speed": "1.1 m/s"}}, "title": "Crash %d", "tags": ["crash", "w%d"]}`, diameter, round, writer)
}

// postRecord posts a record; the path is empty where it is refused.
func postRecord(client *http.Client, address, body string) (path string, answer []byte, err error) {
	r, err := client.Post(address+"/v1/records?what_if=false", "application/json", strings.NewReader(body))
	if err != nil {
		return "", nil, err
	}
	defer r.Body.Close()
	answer, err = io.ReadAll(r.Body)
	if err != nil {
		return "", nil, err
	}
	if r.StatusCode == http.StatusCreated || r.StatusCode == http.StatusOK {
		path = r.Header.Get("Location")
	}
	return path, answer, nil
}

// checkAll asks for records and returns how many are not what was acknowledged.
func checkAll(t *testing.T, client *http.Client, address string, book *ledger, paths []string) int {
	t.Helper()
	lost := 0
	for _, path := range paths {
		r, err := client.Get(address + path)
		if err != nil {
			t.Fatal(err)
		}
		body, err := io.ReadAll(r.Body)
		r.Body.Close()
		if err != nil {
			t.Fatal(err)
		}
		if r.StatusCode != http.StatusOK || sha256.Sum256(body) != book.kept[path] {
			t.Logf("%s: %d: %.200s", path, r.StatusCode, body)
			lost++
		}
	}
	return lost
}

// checkFile checks the file itself while the server has it open: SQLite finds
// no fault, every answer can be read, and there are no records that nobody
// asked for.
func checkFile(t *testing.T, dir string, least, most int) {
	t.Helper()
	db, err := sql.Open("sqlite", "file:"+filepath.Join(dir, store.FileName)+"?mode=ro")
	if err != nil {
		t.Fatal(err)
	}
	defer db.Close()
	var verdict string
	if err := db.QueryRow("PRAGMA integrity_check").Scan(&verdict); err != nil || verdict != "ok" {
		t.Errorf("integrity: %s, %v", verdict, err)
	}
	rows, err := db.Query("SELECT answer FROM record")
	if err != nil {
		t.Fatal(err)
	}
	defer rows.Close()
	n := 0
	for rows.Next() {
		var answer []byte
		if err := rows.Scan(&answer); err != nil {
			t.Fatal(err)
		}
		var a struct {
			Kind string `json:"kind"`
		}
		if err := json.Unmarshal(answer, &a); err != nil || a.Kind != "cylinder" {
			t.Errorf("an answer can't be read: %v", err)
		}
		n++
	}
	if err := rows.Err(); err != nil || n < least || n > most {
		t.Errorf("%v: %d records, wanted %d to %d", err, n, least, most)
	}
}
