package browser

import (
	"os"
	"path/filepath"
	"testing"

	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/chromedp"
)

// TestLook writes screenshots of the interactive pages, in use, into the
// folder that LOOK names; without it, it does nothing.
func TestLook(t *testing.T) {
	dir := os.Getenv("LOOK")
	if dir == "" {
		t.Skip("set LOOK to a folder for screenshots")
	}
	ctx := chrome(t)
	base := places(t)["file"]
	open := chromedp.Evaluate(`document.querySelectorAll("#ask details").forEach(d => { d.open = true; }); 1`, nil)
	for name, steps := range map[string]chromedp.Tasks{
		"ask":    {chromedp.Navigate(base + "material/cumn12ni-strip-lot.html"), ready("ask-at"), open, typed("ask-at", "61 °C"), typed("lot-reads", "44.1 µΩ·cm"), settle()},
		"beside": {chromedp.Navigate(base + "side-by-side.html"), typed("supplier", "±20 ppm/K, box, 20 to 60 °C"), settle()},

		"shunt": {chromedp.Navigate(base + "first-shunt.html"), settle()},
		"find":  {chromedp.Navigate(base + "index.html"), ready("find-text"), typed("find-text", "manga"), settle()},
		"home":  {chromedp.Navigate(base + "index.html"), settle()},
		"list":  {chromedp.Navigate(base + "materials.html"), settle()},
	} {
		for _, width := range []int64{1280, 390} {
			for _, scheme := range []string{"light", "dark"} {
				var png []byte
				if err := chromedp.Run(ctx, chromedp.EmulateViewport(width, 1900), emulation.SetEmulatedMedia().WithFeatures([]*emulation.MediaFeature{{Name: "prefers-color-scheme", Value: scheme}}),
					steps, chromedp.Evaluate(`window.scrollTo(0, 0); 1`, nil), chromedp.CaptureScreenshot(&png)); err != nil {
					t.Fatal(err)
				}
				if err := os.WriteFile(filepath.Join(dir, name+"-"+scheme+map[bool]string{true: "-phone", false: ""}[width == 390]+".png"), png, 0o600); err != nil {
					t.Fatal(err)
				}
			}
		}
	}
}
