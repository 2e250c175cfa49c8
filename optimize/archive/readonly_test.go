//go:build unix

package archive

import (
	"errors"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"syscall"
	"testing"
)

// TestFolderThatCannotBeWritten: a run in such a folder can be read but not taken up, and one cannot be
// begun there. The superuser may write anywhere, so the test runs as somebody else if need be.
func TestFolderThatCannotBeWritten(t *testing.T) {
	if dir := os.Getenv("HOTFRONT_TEST_READONLY"); dir != "" {
		readOnly(t, dir)
		return
	}
	parent := t.TempDir()
	old, empty := filepath.Join(parent, "old"), filepath.Join(parent, "empty")
	a := open(t, old)
	record(t, a, 0, 5)
	if err := a.Close(); err != nil {
		t.Fatal(err)
	}
	if err := os.Mkdir(empty, 0o700); err != nil {
		t.Fatal(err)
	}
	for _, file := range []string{filepath.Join(old, FileName), filepath.Join(old, lockName)} {
		if err := os.Chmod(file, 0o444); err != nil {
			t.Fatal(err)
		}
	}
	for _, dir := range []string{old, empty} {
		if err := os.Chmod(dir, 0o555); err != nil {
			t.Fatal(err)
		}
	}
	t.Cleanup(func() { // or the folder cannot be removed
		for _, dir := range []string{old, empty} {
			if err := os.Chmod(dir, 0o755); err != nil {
				t.Error(err)
			}
		}
	})
	if os.Geteuid() != 0 {
		readOnly(t, parent)
		return
	}
	// Another user must be able to run the test binary and to reach the folders.
	program := filepath.Join(parent, "test")
	binary, err := os.ReadFile(os.Args[0])
	if err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(program, binary, 0o755); err != nil {
		t.Fatal(err)
	}
	for dir := parent; dir != filepath.Dir(os.TempDir()) && len(dir) > len(os.TempDir()); dir = filepath.Dir(dir) {
		if err := os.Chmod(dir, 0o755); err != nil {
			t.Fatal(err)
		}
	}
	const nobody = 65534
	c := exec.Command(program, "-test.run", "^TestFolderThatCannotBeWritten$", "-test.v")
	c.Dir = "/"
	c.Env = append(os.Environ(), "HOTFRONT_TEST_READONLY="+parent)
	c.SysProcAttr = &syscall.SysProcAttr{Credential: &syscall.Credential{Uid: nobody, Gid: nobody, NoSetGroups: true}}
	out, err := c.CombinedOutput()
	if err != nil || !strings.Contains(string(out), "--- PASS: TestFolderThatCannotBeWritten") {
		t.Errorf("as another user: %v\n%s", err, out)
	}
}

func readOnly(t *testing.T, parent string) {
	for _, dir := range []string{"old", "empty", filepath.Join("empty", "new")} {
		_, err := Open(filepath.Join(parent, dir), meta())
		if !errors.Is(err, ErrReadOnly) {
			t.Errorf("%s: %v, want %v", dir, err, ErrReadOnly)
		}
	}
	r, err := Read(filepath.Join(parent, "old"))
	if err != nil {
		t.Fatal(err)
	}
	if n, err := r.Len(); err != nil || n != 5 {
		t.Errorf("%d designs, %v; want 5", n, err)
	}
	if err := r.Close(); err != nil {
		t.Error(err)
	}
}
