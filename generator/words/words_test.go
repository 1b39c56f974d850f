package words

import (
	"bytes"
	"strings"
	"testing"

	"ohmfolio/generator/place"
)

const sample = "# Title *here*\n\nWords with <b>HTML</b> and [43.2 µΩ·cm](../../materials/x.yaml \"resistivity at 85 °C\").\n\n" +
	"## Größe\n\n- item\n\n  ```study: compare\n  materials: [x]\n  windw: 0 °C to 100 °C\n  ```\n\n<script>alert(1)</script>\n\n[other](other.md)\n"

func TestRead(t *testing.T) {
	p, findings := Read(place.NewSource("content/guides/a.md", []byte(sample)))
	if len(findings) != 0 || p.Title != "Title here" {
		t.Fatalf("title %q, findings %v", p.Title, findings)
	}
	if len(p.Studies) != 1 || p.Studies[0].Name != "compare" || p.Studies[0].Body.First != 10 || p.Studies[0].Body.Shift != 2 {
		t.Errorf("study: %+v body %+v", p.Studies, p.Studies[0].Body)
	}
	if !strings.HasPrefix(string(p.Studies[0].Body.Text), "materials: [x]\nwindw") {
		t.Errorf("body %q", p.Studies[0].Body.Text)
	}
	n := p.Numbers[0]
	if n.Written != "43.2 µΩ·cm" || n.Question != "resistivity at 85 °C" || n.Position.Line != 3 || n.Position.Column != 29 {
		t.Errorf("number %+v", n)
	}
	if len(p.Headings) != 1 || p.Headings[0].ID != "h-größe" {
		t.Errorf("headings %+v", p.Headings)
	}
	var b bytes.Buffer
	if err := p.HTML(&b, Fill{Study: func(i int, w *bytes.Buffer) { w.WriteString("<p>STUDY</p>") },
		Number: func(int) string { return "<a>44</a>" }, Link: func(_ int, s string) string { return strings.Replace(s, ".md", ".html", 1) }}); err != nil {
		t.Fatal(err)
	}
	html := b.String()
	for _, want := range []string{"&lt;b&gt;HTML", "<a>44</a>", "STUDY", "&lt;script&gt;", `href="other.html"`, `<h2 id="h-größe">`} {
		if !strings.Contains(html, want) {
			t.Errorf("%q is missing in\n%s", want, html)
		}
	}
	if strings.Contains(html, "<script>") || strings.Contains(html, "Title") {
		t.Errorf("raw HTML or the title passed:\n%s", html)
	}
}

func TestRefusesSchemes(t *testing.T) {
	for _, target := range []string{"javascript:alert(1)", "JaVaScript:x", "data:text/html,x", "java&#x0a;script:alert", "vbscript:x", "file:///etc/passwd"} {
		p, findings := Read(place.NewSource("a.md", []byte("# T\n\n[x]("+target+")\n")))
		var b bytes.Buffer
		_ = p.HTML(&b, Fill{})
		if len(findings) == 0 && strings.Contains(b.String(), "<a href=") {
			t.Errorf("%s passes: %s", target, b.String())
		}
	}
}

func FuzzRead(f *testing.F) {
	f.Add([]byte(sample))
	f.Add([]byte("> ```study: compare\n> materials: [x]"))
	f.Fuzz(func(t *testing.T, text []byte) {
		p, _ := Read(place.NewSource("a.md", text))
		if p == nil {
			return
		}
		var b bytes.Buffer
		if err := p.HTML(&b, Fill{}); err != nil {
			t.Fatal(err)
		}
		if strings.Contains(strings.ToLower(b.String()), "<script") {
			t.Fatalf("a script passes: %q", b.String())
		}
	})
}
