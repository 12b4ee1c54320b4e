package store

import (
	"context"
	"errors"
	"io/fs"
	"os"
	"path/filepath"
	"runtime"
	"syscall"
	"testing"
)

// A directory that may not be written is named, with the system's reason.
func TestReadOnlyDirectory(t *testing.T) {
	dir := t.TempDir()
	// Anybody must be able to come this far: the test may run as root, and then
	// goes on as nobody.
	for at := dir; at != filepath.Dir(os.TempDir()) && at != "/"; at = filepath.Dir(at) {
		if info, err := os.Stat(at); err == nil && info.Mode().Perm()&0o005 != 0o005 {
			if err := os.Chmod(at, info.Mode().Perm()|0o005); err != nil {
				t.Fatal(err)
			}
		}
	}
	if err := os.Chmod(dir, 0o555); err != nil {
		t.Fatal(err)
	}
	if os.Getuid() == 0 {
		runtime.LockOSThread()
		defer runtime.UnlockOSThread()
		if err := syscall.Setfsuid(65534); err != nil {
			t.Fatal(err)
		}
		defer func() {
			if err := syscall.Setfsuid(0); err != nil {
				t.Fatal(err)
			}
		}()
	}
	for _, d := range []string{dir, filepath.Join(dir, "below")} {
		if _, err := OpenSQLite(context.Background(), d); !errors.Is(err, fs.ErrPermission) {
			t.Errorf("%s: %v", d, err)
		}
	}
}
