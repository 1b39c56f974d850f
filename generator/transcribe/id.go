package transcribe

import (
	"fmt"
	"strings"
)

// letters folds what people write in names into the letters of an ID.
var letters = strings.NewReplacer("ä", "ae", "ö", "oe", "ü", "ue", "ß", "ss", "å", "a", "ø", "oe", "æ", "ae",
	"é", "e", "è", "e", "ê", "e", "ë", "e", "á", "a", "à", "a", "â", "a", "ã", "a", "í", "i", "ì", "i", "î", "i", "ó", "o", "ò", "o", "ô", "o", "õ", "o",
	"ú", "u", "ù", "u", "û", "u", "ç", "c", "ñ", "n", "š", "s", "ž", "z", "č", "c", "ř", "r", "ý", "y", "ł", "l", "ń", "n", "ś", "s", "ż", "z", "ź", "z", "ą", "a", "ę", "e", "ć", "c")

const longestID = 60

// idOf makes an ID of a name: small letters, digits, hyphens.
func idOf(name string) string {
	var b strings.Builder
	for _, r := range letters.Replace(strings.ToLower(name)) {
		if r >= 'a' && r <= 'z' || r >= '0' && r <= '9' {
			b.WriteRune(r)
		} else {
			b.WriteByte('-')
		}
	}
	id := strings.Join(strings.FieldsFunc(b.String(), func(r rune) bool { return r == '-' }), "-")
	return strings.TrimRight(id[:min(len(id), longestID)], "-")
}

// ids gives every row an ID of its own.
type ids struct {
	taken map[string]bool
	plain func(string) bool
}

func (s *ids) next(name string, line int) string {
	id := idOf(name)
	if !s.plain(id) {
		id = strings.Trim(fmt.Sprintf("%s-row-%d", id, line), "-")
	}
	free := id
	for n := 2; s.taken[free]; n++ {
		free = fmt.Sprintf("%s-%d", id, n)
	}
	s.taken[free] = true
	return free
}
