package main

import (
	"bytes"
	"context"
	"io"
	"net/http"
	"strings"
	"testing"
)

// The server says where it listens, answers as the command line does, and ends
// with status 0 when it is told to.
func TestServe(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	defer stop()
	printed, out := io.Pipe()
	var log bytes.Buffer
	ended := make(chan int, 1)
	go func() {
		ended <- runContext(ctx, []string{"serve", "--listen", "127.0.0.1:0", "--drain", "0s"}, strings.NewReader(""), out, &log)
		out.Close()
	}()
	line := make([]byte, 200)
	n, err := printed.Read(line)
	if err != nil {
		t.Fatal(err)
	}
	address, found := strings.CutPrefix(strings.TrimSpace(string(line[:n])), "listening on ")
	if !found {
		t.Fatalf("printed %q", line[:n])
	}
	if status, _ := ask(t, http.MethodGet, address+"/readyz", ""); status != http.StatusOK {
		t.Errorf("/readyz: %d", status)
	}
	status, body := ask(t, http.MethodPost, address+"/v1/classify", pileJSON)
	if want := regimed(pileJSON, "classify", "--format", "json", "-"); status != http.StatusOK || body != want.out {
		t.Errorf("%d: got %.300s, want %.300s", status, body, want.out)
	}
	stop()
	if code := <-ended; code != statusMet {
		t.Errorf("ended with %d: %s", code, log.String())
	}
	if lines := strings.Count(log.String(), "\"path\":"); lines != 2 {
		t.Errorf("%d requests in the log:\n%s", lines, log.String())
	}
}

func ask(t *testing.T, method, url, body string) (int, string) {
	t.Helper()
	request, err := http.NewRequest(method, url, strings.NewReader(body))
	if err != nil {
		t.Fatal(err)
	}
	request.Header.Set("Content-Type", "application/json")
	request.Close = true
	response, err := http.DefaultClient.Do(request)
	if err != nil {
		t.Fatal(err)
	}
	defer response.Body.Close()
	data, err := io.ReadAll(response.Body)
	if err != nil {
		t.Fatal(err)
	}
	return response.StatusCode, string(data)
}
