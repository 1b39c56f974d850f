// Package copycheck makes what a printed copy carries so that it can be
// checked: the address of the check page with the material, its revision and
// its fingerprint, as characters and as a QR code.
package copycheck

import (
	"strconv"
	"strings"

	"rsc.io/qr"
)

// Characters are what the check page asks for: ID/revision/fingerprint.
func Characters(id string, revision int, fingerprint string) string {
	return id + "/" + strconv.Itoa(revision) + "/" + fingerprint
}

// Address is the check page of the site with the characters behind it; "" when
// the site's address is not known.
func Address(site, characters string) string {
	if site == "" {
		return ""
	}
	return strings.TrimSuffix(site, "/") + "/check.html#" + characters
}

// A Code is a QR code (ISO/IEC 18004) without its quiet zone, four modules on
// each side.
type Code struct {
	Size int
	code *qr.Code
}

// Quiet is the width of the quiet zone in modules.
const Quiet = 4

// New encodes text with error correction level M (about 15 %).
func New(text string) (Code, error) {
	c, err := qr.Encode(text, qr.M)
	if err != nil {
		return Code{}, err
	}
	return Code{Size: c.Size, code: c}, nil
}

// Runs calls draw for every horizontal run of dark modules: its row, its first
// column and its length.
func (c Code) Runs(draw func(row, from, length int)) {
	for y := range c.Size {
		from := -1
		for x := range c.Size + 1 {
			dark := x < c.Size && c.code.Black(x, y)
			switch {
			case dark && from < 0:
				from = x
			case !dark && from >= 0:
				draw(y, from, x-from)
				from = -1
			}
		}
	}
}

// Path is the code as the data of an SVG path, one unit a module, quiet zone
// included.
func (c Code) Path() string {
	var b strings.Builder
	c.Runs(func(row, from, length int) {
		b.WriteString("M" + strconv.Itoa(from+Quiet) + " " + strconv.Itoa(row+Quiet) + "h" + strconv.Itoa(length) + "v1h-" + strconv.Itoa(length) + "z")
	})
	return b.String()
}
