package main

import (
	"fmt"
	"os"
	"time"
)

// systems are the targets that the program is built for.
var systems = []struct{ os, arch string }{
	{"windows", "amd64"}, {"darwin", "arm64"}, // the two that every run builds
	{"linux", "amd64"}, {"linux", "arm64"}, {"darwin", "amd64"}, {"windows", "arm64"},
}

// touching are the packages that touch files, paths and terminals.
var touching = []string{"./generator/output", "./generator/library", "./generator/command", "./generator/start", "./generator/transcribe"}

// crossBuild builds and vets for other systems: all six with CI=true or
// LONG=1, two otherwise, since an empty build cache costs 30 to 40 seconds of
// processor time a system (and a full one about two).
func crossBuild() error {
	list := systems
	if os.Getenv("CI") != "true" && os.Getenv("LONG") != "1" {
		list = systems[:2]
	}
	for _, s := range list {
		start := time.Now()
		env := []string{"GOOS=" + s.os, "GOARCH=" + s.arch, "CGO_ENABLED=0"}
		if err := commandEnv(env, "go", "build", "-o", os.DevNull, "./generator")(); err != nil {
			return fmt.Errorf("build for %s/%s: %w", s.os, s.arch, err)
		}
		if err := commandEnv(env, "go", append([]string{"vet"}, touching...)...)(); err != nil {
			return fmt.Errorf("vet for %s/%s: %w", s.os, s.arch, err)
		}
		fmt.Printf("   %s/%s in %.1f s\n", s.os, s.arch, time.Since(start).Seconds())
	}
	return nil
}
