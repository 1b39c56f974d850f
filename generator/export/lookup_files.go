package export

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"strconv"
	"strings"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// LookupHeader writes a table of whole numbers as a header of C (C99).
func LookupHeader(w *bytes.Buffer, lib *library.Library, r *material.Record, o Order) error {
	t, err := o.take(r, ownReference)
	if err != nil {
		return err
	}
	l, err := t.lookupOf()
	if err != nil {
		return err
	}
	name := word(r.ID)
	w.WriteString("/* Resistance over temperature, a look-up table for firmware\n *\n")
	writeComments(w, " * ", append(identity(lib, r, t.set), l.words()...), inComment)
	fmt.Fprintf(w, " */\n#ifndef %s_H\n#define %s_H\n\n#include <stdint.h>\n\n", strings.ToUpper(name), strings.ToUpper(name))
	l.writeConstants(w, strings.ToUpper(name))
	l.writeRows(w, name)
	w.WriteString("\n#endif\n")
	return nil
}

// words say how the table is to be read.
func (l *lookup) words() []fact {
	product := "a 32-bit product of difference and remainder is wide enough"
	if !l.productFits() {
		product = "the product of difference and remainder needs 64 bits"
	}
	list := []fact{
		{"row i", "R/R(" + degrees(l.nominal) + ") - 1 at FIRST + i STEP thousandths of a degC, in counts of " + number(l.ppm) + " ppm; R of a fixed body"},
		{"between rows", "straight line; proven to stay within " + boundText(l.bound) + " counts of the curve, rounding of the rows included; rounding the result adds half a count"},
		{"arithmetic", product},
		{"outside the rows", "no value: refuse or flag, do not hold the end value in silence"},
	}
	if n := l.uncovered(); n > 0 {
		list = append(list, fact{"not covered", "the uppermost " + strconv.FormatInt(n, 10) + " thousandths of a K of the window"})
	}
	return list
}

// boundText prints counts to thousandths, rounded up.
func boundText(x float64) string { return ppmUp(x * 1e-6) }

func (l *lookup) writeConstants(w *bytes.Buffer, name string) {
	define := func(what, text string) { fmt.Fprintf(w, "#define %s_%s %s\n", name, what, text) }
	whole := func(x int64) string {
		if x < 0 {
			return "(" + strconv.FormatInt(x, 10) + "L)"
		}
		return strconv.FormatInt(x, 10) + "L"
	}
	define("REVISION", strconv.Itoa(l.record.Revision))
	define("FINGERPRINT", inQuotes(l.record.Fingerprint))
	define("STATE", inQuotes(stateText(l.record)))
	define("NOMINAL", whole(thousandths(l.nominal))+" /* thousandths of a degC */")
	define("FIRST", whole(l.first)+" /* thousandths of a degC */")
	define("STEP", whole(l.stepM)+" /* thousandths of a K */")
	define("ROWS", strconv.Itoa(len(l.counts)))
	define("COUNT_PPB", whole(int64(l.ppm*1000))+" /* one count in parts per thousand million */")
}

func thousandths(kelvin float64) int64 {
	c := (kelvin - quantity.ZeroCelsius) * 1000
	if c < 0 {
		return -int64(-c + 0.5)
	}
	return int64(c + 0.5)
}

func (l *lookup) writeRows(w *bytes.Buffer, name string) {
	fmt.Fprintf(w, "\nstatic const int%d_t %s_change[%d] = {", l.bits(), name, len(l.counts))
	line := w.AvailableBuffer()
	for i, c := range l.counts {
		line = append(line, ", "...)
		if i%10 == 0 {
			line = append(line[:len(line)-1], "\n\t"...)
		}
		line = strconv.AppendInt(line, int64(c), 10)
	}
	w.Write(line[1:]) // without the first comma
	w.WriteString("\n};\n")
}

// LookupCSV writes the same table as CSV; every row carries its identity.
func LookupCSV(w *bytes.Buffer, _ *library.Library, r *material.Record, o Order) error {
	t, err := o.take(r, ownReference)
	if err != nil {
		return err
	}
	l, err := t.lookupOf()
	if err != nil {
		return err
	}
	tail := append([]string{number(l.ppm), boundText(l.bound), noValue, number(t.nominal - quantity.ZeroCelsius)}, t.identityCells()...)
	c := newCSV(w, tableSchemas[0].columns, tail)
	for i, count := range l.counts {
		c.row(strconv.FormatInt(l.first+int64(i)*l.stepM, 10), strconv.Itoa(int(count)))
	}
	return nil
}

// identityCells are material, data set, revision, fingerprint and status.
func (t *task) identityCells() []string {
	return []string{t.record.ID, cell(t.set.Name), strconv.Itoa(t.record.Revision), t.record.Fingerprint, stateText(t.record)}
}

// noValue is what the tables say of temperatures outside their rows.
const noValue = "no value"

// tailed writes CSV (RFC 4180) whose rows all end with the same cells.
type tailed struct {
	w    *bytes.Buffer
	tail []byte
}

func newCSV(w *bytes.Buffer, columns []csvwColumn, tail []string) *tailed {
	var heads []string
	for _, c := range columns {
		heads = append(heads, c.Name)
	}
	c := csv.NewWriter(w)
	c.UseCRLF = true
	_ = c.Write(heads) // a buffer takes everything
	c.Flush()
	var b bytes.Buffer
	c = csv.NewWriter(&b)
	c.UseCRLF = true
	_ = c.Write(tail)
	c.Flush()
	return &tailed{w, b.Bytes()}
}

// row writes numbers, which need no quotes, and the tail.
func (c *tailed) row(numbers ...string) {
	for _, n := range numbers {
		c.w.WriteString(n)
		c.w.WriteByte(',')
	}
	c.w.Write(c.tail)
}
