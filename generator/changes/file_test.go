package changes

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"strings"
	"testing"

	"ohmfolio/generator/library"
)

// TestFileIsCanonical: what was read is written with the same bytes, is plain
// JSON, and is compared as if it had never been in a file.
func TestFileIsCanonical(t *testing.T) {
	lib, err := library.Load("../..", library.Options{})
	if err != nil {
		t.Fatal(err)
	}
	s := Freeze(lib, nil, "2026-06")
	text := written(t, s)
	var all struct {
		Materials []map[string]any `json:"materials"`
	}
	if err := json.Unmarshal(text, &all); err != nil || len(all.Materials) < 35 {
		t.Fatalf("%d materials, %v", len(all.Materials), err)
	}
	for _, name := range strings.Fields("id name status revision fingerprint data_sets segments stated") { // data/ID.json, and more
		if _, ok := all.Materials[0][name]; !ok {
			t.Errorf("the field %s is missing", name)
		}
	}
	back, err := Read(text)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(written(t, back), text) {
		t.Error("read and written again it has other bytes")
	}
	if r := Compare(s, back, "memory", "file"); !r.Same {
		t.Error(r.Text())
	}
	if _, err := Read(bytes.ReplaceAll(text, []byte("\n"), []byte("\r\n"))); err != nil {
		t.Errorf("with other line ends: %v", err)
	}
	sum := sha256.Sum256(text[:bytes.LastIndex(text, []byte(`"sha256"`))])
	if !bytes.HasSuffix(text, []byte(hex.EncodeToString(sum[:])+"\"}\n")) {
		t.Error("the sum is not the SHA-256 of what stands before it")
	}
}

// TestOpenedAndRead: a statement that was only opened says the same.
func TestOpenedAndRead(t *testing.T) {
	changed := strings.Replace(copper, "3.93e-3", "4.03e-3", 1)
	old := written(t, frozen(t, map[string]string{"copper": copper, "same": copper, "gone": copper, "old-name": copper}, report))
	now := written(t, frozen(t, map[string]string{"copper": changed, "same": copper, "new-name": copper + "formerly: [old-name]\n"}, report))
	var texts [2]string
	for i, read := range []func([]byte) (*Statement, error){Read, Open} {
		a, errA := read(old)
		b, errB := read(bytes.ReplaceAll(now, []byte("\n"), []byte("\r\n")))
		if errA != nil || errB != nil {
			t.Fatal(errA, errB)
		}
		texts[i] = Compare(a, b, "old", "new").Text()
		a.Edition = "a"
		b.Edition = "b"
		if rows := Rows([]*Statement{a, b}); rows[0].Released != 3 || rows[1].Materials != 4 || rows[0].Report.Counts() != "1 removed, 1 renamed, 1 changed, 1 unchanged" {
			t.Errorf("%+v", rows)
		}
		if h := History([]*Statement{a, b}, "same"); len(h) != 1 || h[0].Statement != "a" {
			t.Errorf("%+v", h)
		}
		if h := History([]*Statement{a, b}, "new-name"); len(h) != 2 || h[0].Change.Change != Renamed {
			t.Errorf("%+v", h)
		}
	}
	if texts[0] != texts[1] || !strings.Contains(texts[0], "renamed from old-name") {
		t.Errorf("read:\n%s\nopened:\n%s", texts[0], texts[1])
	}
}

func TestDamage(t *testing.T) {
	text := written(t, frozen(t, one(copper), report))
	for i := 0; i < len(text); i += 3 {
		broken := bytes.Clone(text)
		broken[i] ^= 1
		if _, err := Read(broken); err == nil && broken[i] != text[i] && i < len(text)-3 {
			t.Fatalf("byte %d, %q for %q: read all the same", i, broken[i], text[i])
		}
	}
	for i := 0; i < len(text)-3; i += 5 {
		if _, err := Read(text[:i]); err == nil {
			t.Fatalf("cut off after %d bytes and read all the same", i)
		}
	}
}

func sealed(text string) []byte { return []byte(seal(text)) }

func TestRefused(t *testing.T) {
	for _, c := range []struct{ name, text, says string }{
		{"newer", string(sealed(`{"format":2,`)), "format 2"},
		{"empty", "", "empty"},
		{"earlier", `{"title":"X","materials":[{"id":"x"}]}`, "no format number"},
		{"other JSON", `{"a":1}`, "no statement"},
		{"no JSON", "name: X\n", "no statement"},
		{"wrong type", string(sealed("{\"format\":1,\n\"materials\":3,")), "line 2"},
		{"unsorted", string(sealed(`{"format":1,"materials":[{"id":"b"},{"id":"a"}],`)), "not sorted"},
		{"twice", string(sealed(`{"format":1,"materials":[{"id":"a"},{"id":"a"}],`)), "not sorted"},
		{"falling", string(sealed(`{"format":1,"materials":[{"id":"a","segments":{"resistivity_ohm_m":[{"from_K":2,"to_K":1,"c":[0,0,0,0]}]}}],`)), "does not rise"},
		{"name", string(sealed(`{"format":1,"edition":"../x",`)), "no edition can have"},
	} {
		_, err := Read([]byte(c.text))
		if err == nil || !strings.Contains(err.Error(), c.says) {
			t.Errorf("%s: %v", c.name, err)
		}
	}
}

// FuzzRead: no text of an edition makes reading or comparing fail otherwise
// than with an error; what is read is written and read again the same.
func FuzzRead(f *testing.F) {
	base := frozen(f, one(copper), report)
	whole := string(written(f, base))
	f.Add(whole[:strings.LastIndex(whole, `"sha256"`)])
	f.Add(`{"format":1,"materials":[{"id":"a","corners":{"curves":[[]]},"stated":[{"path":"x","kind":"temperature","unit":"furlong"}]}],`)
	f.Fuzz(func(t *testing.T, text string) {
		s, err := Read(sealed(text))
		if err != nil {
			return
		}
		r := Compare(base, s, "a", "b")
		if r.Text() == "" {
			t.Error("a report without words")
		}
		if _, err := json.Marshal(r); err != nil {
			t.Error(err)
		}
		History([]*Statement{base, s}, "copper")
		if o, err := Open(sealed(text)); err == nil {
			Compare(o, base, "a", "b")
			Rows([]*Statement{base, o})
			History([]*Statement{o, base}, "copper")
		}
		first := written(t, s)
		again, err := Read(first)
		if err != nil {
			t.Fatal(err)
		}
		if !bytes.Equal(written(t, again), first) {
			t.Error("not the same bytes")
		}
	})
}
