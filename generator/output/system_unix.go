//go:build unix

package output

import (
	"errors"
	"os"
	"syscall"
)

// alive tells whether a process with this number runs.
func alive(pid int) bool {
	if pid <= 0 {
		return false
	}
	err := syscall.Kill(pid, 0)
	return err == nil || errors.Is(err, syscall.EPERM)
}

// syncFolder asks the system to bring the folder's entries to disk: once, at
// the end. A failure changes nothing of what readers see.
func syncFolder(dir string) {
	if f, err := os.Open(dir); err == nil {
		f.Sync()
		f.Close()
	}
}
