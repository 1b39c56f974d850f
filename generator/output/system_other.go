//go:build !unix

package output

import "os"

// alive tells whether a process with this number runs: where a process can be
// opened by its number, it does.
func alive(pid int) bool {
	if pid <= 0 {
		return false
	}
	p, err := os.FindProcess(pid)
	if err != nil {
		return false
	}
	p.Release()
	return true
}

// syncFolder does nothing: folders cannot be opened for it here.
func syncFolder(string) {}
