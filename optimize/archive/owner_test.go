package archive

import (
	"bufio"
	"errors"
	"fmt"
	"os"
	"os/exec"
	"strconv"
	"strings"
	"testing"
	"time"
)

// TestOwnerOfALock: a folder held by another process is refused and names that process; as soon as that
// process is killed (kill -9) the folder is free.
func TestOwnerOfALock(t *testing.T) {
	if dir := os.Getenv("HOTFRONT_TEST_OWNER"); dir != "" {
		a := open(t, dir)
		record(t, a, 0, 5)
		fmt.Println("held")
		time.Sleep(time.Minute) // killed long before
		_ = a.Close()
		return
	}
	dir := t.TempDir()
	c := exec.Command(os.Args[0], "-test.run", "^TestOwnerOfALock$")
	c.Env = append(os.Environ(), "HOTFRONT_TEST_OWNER="+dir)
	out, err := c.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := c.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		_ = c.Process.Kill() // a second time where all went well
		_ = c.Wait()
	})
	if line, err := bufio.NewReader(out).ReadString('\n'); err != nil || line != "held\n" {
		t.Fatalf("the owner said %q, %v", line, err)
	}
	_, err = Open(dir, meta())
	locked, ok := errors.AsType[*LockedError](err)
	if !ok {
		t.Fatalf("second opener: %v", err)
	}
	if !strings.Contains(locked.Owner, "process "+strconv.Itoa(c.Process.Pid)+" on ") || locked.Dir != dir {
		t.Errorf("owner %q of %q, want process %d of %q", locked.Owner, locked.Dir, c.Process.Pid, dir)
	}
	if err := readAll(dir); err != nil {
		t.Errorf("reading beside the owner: %v", err)
	}
	if err := c.Process.Kill(); err != nil {
		t.Fatal(err)
	}
	_ = c.Wait() // killed
	a := open(t, dir)
	defer a.Close()
	if n, err := a.Len(); n != 5 || err != nil {
		t.Errorf("%d designs, %v; want 5", n, err)
	}
	record(t, a, 5, 5)
}
