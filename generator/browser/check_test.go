package browser

import (
	"os"
	"regexp"
	"strings"
	"testing"

	"github.com/chromedp/chromedp"
)

// TestCheckPage types the characters of copies into the real page: current,
// superseded with the numbers that changed, withdrawn, a draft, unknown,
// nonsense, and a hostile address that must run nothing.
func TestCheckPage(t *testing.T) {
	dir := published(t)
	ctx := chrome(t)
	fingerprint := func(id string) string {
		page, err := os.ReadFile(dir + "/sheet/" + id + ".html")
		if err != nil {
			t.Fatal(err)
		}
		return regexp.MustCompile(id + `/[0-9]+/([0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4})`).FindStringSubmatch(string(page))[0]
	}
	edition, err := os.ReadFile("../../materials/editions/2026-10.json")
	if err != nil {
		t.Fatal(err)
	}
	old := regexp.MustCompile(`"id":"cumn12ni-strip-lot"[^{}]*?"revision":([0-9]+),"fingerprint":"([0-9a-f-]+)"`).FindStringSubmatch(string(edition))
	if old == nil {
		t.Fatal("the edition has no strip lot")
	}
	current := fingerprint("cumn12ni")
	for _, c := range []struct{ hash, want string }{
		{current, "Current: revision"},
		{strings.ToUpper(strings.ReplaceAll(current, "-", " ")), "Current: revision"},
		{"cumn12ni-strip-lot/" + old[1] + "/" + old[2], "Superseded by revision"},
		{"cumn12ni-strip-lot/" + old[1] + "/" + old[2], "thermal_conductivity"},
		{"cumn12ni/999/0000-0000-0000", "never stated here"},
		{"cumn12ni/1/0000-0000-0000", "differences are not known"},
		{fingerprint("manganin-textbook"), "Withdrawn"},
		{"no-such-metal/1/0000-0000-0000", "Unknown: this reference has no material"},
		{"__proto__/1/0", "not the characters"},
		{"constructor/1/0000", "Unknown: this reference has no material"},
		{"<img src=x onerror=alert(1)>/1/x", "not the characters"},
		{"%", "not the characters"},
	} {
		var text, markup string
		err := chromedp.Run(ctx, chromedp.Navigate("about:blank"), chromedp.Navigate("file://"+dir+"/check.html#"+c.hash),
			chromedp.Text("#answer", &text, chromedp.ByID), chromedp.InnerHTML("#answer", &markup, chromedp.ByID))
		if err != nil {
			t.Fatal(err)
		}
		if !strings.Contains(text, c.want) || strings.Contains(markup, "<img") {
			t.Errorf("%q: %q, want %q", c.hash, text, c.want)
		}
	}
	var text string
	if err := chromedp.Run(ctx, chromedp.Navigate("file://"+dir+"/check.html"), chromedp.SendKeys("#copy", " CuMn12Ni / "+strings.Split(current, "/")[1]+" / "+strings.ToUpper(strings.ReplaceAll(strings.Split(current, "/")[2], "-", ""))+"\n", chromedp.ByID),
		chromedp.Text("#answer", &text, chromedp.ByID)); err != nil || !strings.Contains(text, "Current") {
		t.Errorf("typed by hand: %q, %v", text, err)
	}
}
