package main

import (
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
)

// debian maps a program that the checks call to the package that brings it.
var debian = []struct{ program, pkg string }{
	{"chromium", "chromium"}, {"pdftotext", "poppler-utils"}, {"units", "units"}, {"java", "default-jre-headless"}, {"npm", "npm"}, {"ngspice", "ngspice"}, {"gcc", "gcc"}, {"qpdf", "qpdf"}, {"zbarimg", "zbar-tools"},
	{"Rscript", "r-base-core"},
}

// modules maps a Python module that the checks import to its package.
var modules = []struct{ module, pkg string }{{"scipy", "python3-scipy"}}

// tools installs what is missing. Without the means to install it the tests
// decide: they skip what cannot run, and fail with CI=true.
func tools() error {
	var missing []string
	for _, d := range debian {
		if _, err := exec.LookPath(d.program); err != nil {
			missing = append(missing, d.pkg)
		}
	}
	for _, m := range modules {
		if exec.Command("/usr/bin/python3", "-c", "import "+m.module).Run() != nil {
			missing = append(missing, m.pkg)
		}
	}
	if len(missing) > 0 {
		if err := install(missing); err != nil {
			return optional(err)
		}
	}
	browser := filepath.Join("generator", "browser")
	if _, err := os.Stat(filepath.Join(browser, "node_modules", "vnu-jar")); err == nil {
		return nil
	}
	fmt.Println("   installing the HTML validator and the accessibility checker with npm")
	c := exec.Command("npm", "ci", "--no-audit", "--no-fund", "--ignore-scripts")
	c.Dir, c.Stdout, c.Stderr = browser, os.Stdout, os.Stderr
	return optional(c.Run())
}

func install(packages []string) error {
	fmt.Println("   installing from Debian:", packages)
	if os.Geteuid() != 0 {
		return fmt.Errorf("missing %v; install them, or run this as root on Debian", packages)
	}
	for _, args := range [][]string{{"update", "-qq"}, append([]string{"install", "-y", "-qq", "--no-install-recommends"}, packages...)} {
		c := exec.Command("apt-get", args...)
		c.Env = append(os.Environ(), "DEBIAN_FRONTEND=noninteractive")
		c.Stderr = os.Stderr
		if err := c.Run(); err != nil {
			return fmt.Errorf("apt-get %s: %w", args[0], err)
		}
	}
	return nil
}

// optional lets a failure pass on a developer's own machine, with a word.
func optional(err error) error {
	if err == nil || os.Getenv("CI") == "true" {
		return err
	}
	fmt.Println("   going on without:", err)
	return nil
}
