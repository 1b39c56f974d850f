package site

import (
	"html"
	"html/template"
	"strings"

	"ohmfolio/generator/output"
	"ohmfolio/generator/topics"
)

func topicPath(t topics.Topic) string { return "guide/" + t.Name + ".html" }

// topics are those that no guide of the reference has the name of.
func (s *site) topics() []topics.Topic {
	var list []topics.Topic
	for _, t := range s.in.Topics {
		taken := false
		for _, d := range s.in.Library.Documents {
			taken = taken || pagePath(d) == topicPath(t)
		}
		if !taken {
			list = append(list, t)
		}
	}
	return list
}

// topicLinks lead to the topics from the root.
func (s *site) topicLinks() []link {
	var list []link
	for _, t := range s.topics() {
		list = append(list, link{t.Title, topicPath(t)})
	}
	return list
}

// topic is a page of the guide that is made from the program's own lists.
func (s *site) topic(t topics.Topic) output.Output {
	return s.page(topicPath(t), "guide-page", func() any {
		p := documentPage{frame: s.frame(t.Title, "document", "../", ""), Heading: t.Title}
		var b strings.Builder
		b.WriteString("<p>" + html.EscapeString(t.Lead) + "</p>\n")
		for _, part := range t.Parts {
			id := "h-" + topics.Anchor(part.Title)
			p.Contents = append(p.Contents, contentsItem{id, part.Title})
			b.WriteString(`<h2 id="` + id + `">` + html.EscapeString(part.Title) + "</h2>\n")
			if part.Text != "" {
				b.WriteString("<p>" + html.EscapeString(part.Text) + "</p>\n")
			}
			b.WriteString(string(partTable(part)))
		}
		p.Body = template.HTML(b.String()) // every text is escaped above
		return p
	})
}

func partTable(p topics.Part) template.HTML {
	t := tableWriter{of: p.Title}
	t.begin("", p.Heads, nil)
	for _, row := range p.Rows { // all text: 1e-8 ohm m is a spelling, no number to stand on the right
		tag := `th scope="row"`
		t.b.WriteString("<tr>")
		for _, c := range row {
			t.b.WriteString("<" + tag + wideClass(c) + ">")
			t.text(c)
			t.b.WriteString("</" + tag[:2] + ">")
			tag = "td"
		}
		t.b.WriteString("</tr>\n")
	}
	return t.end(nil)
}
