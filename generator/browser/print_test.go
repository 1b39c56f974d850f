package browser

import (
	"context"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"

	"github.com/chromedp/cdproto/page"
	"github.com/chromedp/chromedp"
)

// TestSheetPrints prints the sheet on A4 and on Letter and reads the PDF back:
// every page has the identity, its number and the warning of printed copies.
func TestSheetPrints(t *testing.T) {
	need(t, "pdftotext")
	ctx := chrome(t)
	base := places(t)["file"]
	for name, size := range map[string][2]float64{"A4": {8.27, 11.69}, "Letter": {8.5, 11}} {
		for _, id := range []string{"cumn12ni-strip-lot", "platinum-thermometer", "zinc"} {
			file := filepath.Join(t.TempDir(), id+".pdf")
			err := chromedp.Run(ctx, chromedp.Navigate(base+"sheet/"+id+".html"), chromedp.ActionFunc(func(ctx context.Context) error {
				pdf, _, err := page.PrintToPDF().WithPaperWidth(size[0]).WithPaperHeight(size[1]).WithPreferCSSPageSize(false).
					WithMarginTop(0.55).WithMarginBottom(0.63).WithMarginLeft(0.6).WithMarginRight(0.6).Do(ctx)
				if err != nil {
					return err
				}
				return os.WriteFile(file, pdf, 0o600)
			}))
			if err != nil {
				t.Fatal(err)
			}
			checkPrinted(t, name, id, file)
		}
	}
}

func checkPrinted(t *testing.T, paper, id, file string) {
	text, err := exec.Command("pdftotext", "-layout", file, "-").Output()
	if err != nil {
		t.Fatal(err)
	}
	sheets := strings.Split(strings.TrimSuffix(string(text), "\f"), "\f")
	if len(sheets) < 1 || len(sheets) > 4 {
		t.Errorf("%s, %s: %d pages", id, paper, len(sheets))
	}
	for i, s := range sheets {
		for _, want := range []string{"-" + id, "revision", "fingerprint", "Printed copy: check the revision", pageOf(i+1, len(sheets))} {
			if !strings.Contains(s, want) {
				t.Errorf("%s, %s: %q is missing on page %d of %d:\n%s", id, paper, want, i+1, len(sheets), s)
			}
		}
	}
}

func pageOf(n, of int) string {
	return "page " + string(rune('0'+n)) + " of " + string(rune('0'+of))
}

// TestPrintIsMonochrome: with print media every ink of a figure is black, so
// that dashes and labels alone tell curves apart.
func TestPrintIsMonochrome(t *testing.T) {
	ctx := chrome(t)
	var colours []string
	if err := chromedp.Run(ctx, chromedp.ActionFunc(func(ctx context.Context) error {
		return emulatePrint(ctx)
	}), chromedp.Navigate(places(t)["file"]+"sheet/copper-pure.html"),
		chromedp.Evaluate(`Array.from(new Set(Array.from(document.querySelectorAll(".figure .curve")).map(p => getComputedStyle(p).stroke)))`, &colours)); err != nil {
		t.Fatal(err)
	}
	if len(colours) != 1 || colours[0] != "rgb(0, 0, 0)" {
		t.Errorf("inks in print: %v", colours)
	}
}
