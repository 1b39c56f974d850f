// Command verify runs every check of the project. It installs what the checks
// need when it is missing, and says so: Debian's chromium, poppler, GNU units,
// ngspice and gcc, a Java runtime, and two npm packages (an HTML validator and
// an accessibility checker). With CI=true a check that cannot run fails.
//
//	go run ./generator/verify
package main

import (
	"bytes"
	"crypto/sha256"
	"fmt"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"time"
)

// step is one check: a name and what it does.
type step struct {
	name string
	run  func() error
}

func main() {
	steps := []step{
		{"tools", tools},
		{"format", format},
		{"vet", command("go", "vet", "./...")},
		{"build and vet for other systems", crossBuild},
		{"tests, race detector", command("go", "test", "-race", "./...")},
		{"fuzzing, ten seconds a target", fuzz},
		{"same bytes on two processor levels", sameBytes},
	}
	failed := 0
	for _, s := range steps {
		start := time.Now()
		fmt.Printf("== %s\n", s.name)
		if err := s.run(); err != nil {
			failed++
			fmt.Printf("FAILED %s: %v\n", s.name, err)
			continue
		}
		fmt.Printf("   done in %.1f s\n", time.Since(start).Seconds())
	}
	fmt.Printf("%d passed, %d failed\n", len(steps)-failed, failed)
	if failed > 0 {
		os.Exit(1)
	}
}

func command(name string, args ...string) func() error { return commandEnv(nil, name, args...) }

func commandEnv(env []string, name string, args ...string) func() error {
	return func() error {
		c := exec.Command(name, args...)
		c.Env = append(os.Environ(), env...)
		c.Stdout, c.Stderr = os.Stdout, os.Stderr
		return c.Run()
	}
}

// format fails when a Go file is not formatted.
func format() error {
	out, err := exec.Command("gofmt", "-l", "generator", "themes").Output()
	if err != nil {
		return err
	}
	if len(out) > 0 {
		return fmt.Errorf("not formatted:\n%s", out)
	}
	return nil
}

// targets are the fuzz targets by package.
func fuzz() error {
	files, err := exec.Command("grep", "-rlE", "^func Fuzz", "--include=*_test.go", "generator").Output()
	if err != nil {
		return fmt.Errorf("no fuzz target is found: %w", err)
	}
	for _, file := range strings.Fields(string(files)) {
		text, err := os.ReadFile(file)
		if err != nil {
			return err
		}
		for _, line := range strings.Split(string(text), "\n") {
			name, ok := strings.CutPrefix(line, "func Fuzz")
			if !ok {
				continue
			}
			name = "Fuzz" + name[:strings.IndexByte(name, '(')]
			if err := command("go", "test", "-run", "^$", "-fuzz", "^"+name+"$", "-fuzztime", fuzzTime(), "-fuzzminimizetime", "10x", "./"+filepath.ToSlash(filepath.Dir(file)))(); err != nil {
				return fmt.Errorf("%s: %w", name, err)
			}
		}
	}
	return nil
}

// fuzzTime is ten seconds a target, a minute with LONG=1.
func fuzzTime() string {
	if os.Getenv("LONG") == "1" {
		return "60s"
	}
	return "10s"
}

// sameBytes publishes the demo with two builds that may use different
// instructions, and compares every byte.
func sameBytes() error {
	dir, err := os.MkdirTemp("", "ohmfolio-bytes-")
	if err != nil {
		return err
	}
	defer os.RemoveAll(dir)
	var sums []string
	for _, level := range []string{"v1", "v3"} {
		binary, site := filepath.Join(dir, "ohmfolio-"+level), filepath.Join(dir, "site-"+level)
		if err := commandEnv([]string{"GOARCH=amd64", "GOAMD64=" + level}, "go", "build", "-o", binary, "./generator")(); err != nil {
			return err
		}
		var stderr bytes.Buffer
		c := exec.Command(binary, "publish", "--into", site)
		c.Stderr = &stderr
		if err := c.Run(); err != nil {
			return fmt.Errorf("level %s: %w\n%s", level, err, stderr.String())
		}
		sum, err := folderSum(site)
		if err != nil {
			return err
		}
		sums = append(sums, sum)
	}
	if sums[0] != sums[1] {
		return fmt.Errorf("the sites differ: %s and %s", sums[0], sums[1])
	}
	return nil
}

func folderSum(dir string) (string, error) {
	h := sha256.New()
	err := filepath.WalkDir(dir, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		text, err := os.ReadFile(path)
		rel, _ := filepath.Rel(dir, path)
		fmt.Fprintf(h, "%s %d\n", filepath.ToSlash(rel), len(text))
		h.Write(text)
		return err
	})
	return fmt.Sprintf("%x", h.Sum(nil)[:8]), err
}
