package published

import (
	"os"
	"os/exec"
	"strconv"
	"strings"
	"testing"
)

// Need skips the test where a reference program is missing; with CI=true it
// fails, because a check that cannot run is no check.
func Need(t testing.TB, program, debianPackage string) {
	t.Helper()
	if _, err := exec.LookPath(program); err == nil {
		return
	}
	if os.Getenv("CI") == "true" {
		t.Fatalf("%s is missing: install the Debian package %s", program, debianPackage)
	}
	t.Skipf("%s is missing: install the Debian package %s", program, debianPackage)
}

// debianPython is the Python that Debian's own modules belong to.
const debianPython = "/usr/bin/python3"

// Scipy runs a Python script, which is given numpy as np and scipy, and returns
// the numbers it printed, line by line.
func Scipy(t testing.TB, script string) [][]float64 {
	t.Helper()
	Need(t, debianPython, "python3-scipy")
	if exec.Command(debianPython, "-c", "import scipy").Run() != nil {
		Need(t, "python3 with scipy", "python3-scipy")
	}
	head := "import sys\nimport numpy as np\nimport scipy.interpolate, scipy.stats\nnp.set_printoptions(precision=17, floatmode='unique', linewidth=100000)\n" +
		"def tell(*x): print(*[repr(float(v)) for v in np.ravel(np.concatenate([np.ravel(a) for a in x]))])\n"
	return numbers(t, head+script, debianPython, "-")
}

// R runs a script of R and returns the numbers it printed, line by line; the
// script prints with tell().
func R(t testing.TB, script string) [][]float64 {
	t.Helper()
	Need(t, "Rscript", "r-base-core")
	return numbers(t, "tell <- function(...) cat(sprintf('%.17g', c(...)), '\\n')\n"+script, "R", "--vanilla", "--slave")
}

func numbers(t testing.TB, script, program string, args ...string) (lines [][]float64) {
	t.Helper()
	c := exec.Command(program, args...)
	c.Stdin = strings.NewReader(script)
	var errors strings.Builder
	c.Stderr = &errors
	out, err := c.Output()
	if err != nil {
		t.Fatalf("%s: %v\n%s", program, err, errors.String())
	}
	for _, line := range strings.Split(strings.TrimSpace(string(out)), "\n") {
		var row []float64
		for _, cell := range strings.Fields(line) {
			row = append(row, Number(t, cell))
		}
		lines = append(lines, row)
	}
	return lines
}

// List writes numbers as Python and R both read them between brackets.
func List(numbers []float64) string {
	var b strings.Builder
	for i, x := range numbers {
		if i > 0 {
			b.WriteString(", ")
		}
		b.WriteString(strconv.FormatFloat(x, 'g', -1, 64))
	}
	return b.String()
}
