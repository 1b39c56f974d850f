package material

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"

	"ohmfolio/generator/form"
)

// administrative keys change who answers for a record, not what it states:
// they are outside the fingerprint, and so are lots, stock prices and dates.
var administrative = map[string]bool{
	"status": true, "revision": true, "sign_off": true, "lots": true, "formerly": true, "replaced_by": true, "withdrawn_reason": true,
	"date": true, "by": true, "expires": true,
}

// fingerprint is a short hash over what a sheet states of the material: the
// canonical values, however the YAML is spelled. Twelve hexadecimal digits in
// groups of four: 48 bits tell the revisions of one record apart, and can be
// read out over a telephone.
// Measured points count with their values, wherever their file stands.
func fingerprint(n *form.Node, sets []*DataSet) string {
	var b bytes.Buffer
	n.Canonical(&b, func(key string) bool { return administrative[key] })
	for _, s := range sets {
		if s.Fitted == nil {
			continue
		}
		for _, p := range s.Fitted.Points {
			fmt.Fprintf(&b, "%.12g %.12g %.12g %.12g;", p.T, p.Y, p.U, p.UT)
		}
	}
	sum := sha256.Sum256(b.Bytes())
	h := hex.EncodeToString(sum[:6])
	return h[:4] + "-" + h[4:8] + "-" + h[8:]
}
