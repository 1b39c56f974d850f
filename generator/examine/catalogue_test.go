package examine

import (
	"regexp"
	"sort"
	"strings"
	"testing"

	"golang.org/x/tools/txtar"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/study"
)

// untriggered are the kinds that no small text can trigger; each is tested
// where it is named.
var untriggered = map[string]string{
	"file-too-large":  "TestTooLarge here",
	"file-unreadable": "library, with links and permissions",
}

// examined loads a txtar archive as a reference and returns its findings.
func examined(archive, today string) []place.Finding {
	files := map[string][]byte{}
	for _, f := range txtar.Parse([]byte(archive)).Files {
		files[f.Name] = f.Data
	}
	lib := library.FromFiles(files)
	var outcomes []Judged
	more := changes.Examine(lib)
	for _, d := range lib.Documents {
		for _, block := range d.Page.Studies {
			o, found := study.Run(lib, block)
			more = append(more, found...)
			if o != nil {
				outcomes = append(outcomes, Judged{d, o})
			}
		}
	}
	return Run(lib, outcomes, Options{Today: today, Parallel: 1, More: more})
}

func TestCatalogueIsWhole(t *testing.T) {
	list := Catalogue()
	if len(list) < 30 {
		t.Errorf("only %d kinds of finding", len(list))
	}
	code := regexp.MustCompile(`^[a-z0-9]+(-[a-z0-9]+)*$`)
	seen := map[string]bool{}
	for _, k := range list {
		if !code.MatchString(k.Code) || seen[k.Code] {
			t.Errorf("the code %q is not plain or stands twice", k.Code)
		}
		seen[k.Code] = true
		if k.Title == "" || k.Explanation == "" || k.Mend == "" || k.Severity == "" {
			t.Errorf("%s is not documented: %+v", k.Code, k)
		}
		if k.Trigger == "" && untriggered[k.Code] == "" {
			t.Errorf("%s has no trigger", k.Code)
		}
	}
}

func TestRulesAreSorted(t *testing.T) {
	if !sort.SliceIsSorted(rules, func(i, j int) bool { return rules[i].Kind.Code < rules[j].Kind.Code }) {
		var codes []string
		for _, r := range rules {
			codes = append(codes, r.Kind.Code)
		}
		t.Errorf("not sorted by code: %s", strings.Join(codes, ", "))
	}
	for _, r := range rules {
		if (r.Record == nil) == (r.Whole == nil) {
			t.Errorf("%s must look at records or at the whole", r.Kind.Code)
		}
	}
}

// TestTriggers runs the smallest input of every kind and wants its code, a
// file, and a source line under every place in a text.
func TestTriggers(t *testing.T) {
	for _, k := range Catalogue() {
		if k.Trigger == "" {
			continue
		}
		found := false
		for _, f := range examined(k.Trigger, "2099-01-01") {
			if f.Code != k.Code {
				continue
			}
			found = true
			if f.Position.File == "" || f.Message == "" {
				t.Errorf("%s: a finding without a place or a message: %+v", k.Code, f)
			}
		}
		if !found {
			t.Errorf("%s is not found by its trigger:\n%s\nfound: %v", k.Code, k.Trigger, codesOf(examined(k.Trigger, "2099-01-01")))
		}
	}
}

func codesOf(findings []place.Finding) []string {
	var list []string
	for _, f := range findings {
		list = append(list, f.Code)
	}
	return list
}

func TestTooLarge(t *testing.T) {
	archive := "-- materials/x.yaml --\nname: " + strings.Repeat("x", form.MaxBytes) + "\n"
	if list := codesOf(examined(archive, "")); len(list) == 0 || !strings.Contains(strings.Join(list, " "), "file-too-large") {
		t.Errorf("found %v", list)
	}
}

// TestGoodRecordIsQuiet: the correct look-alike of most triggers is found
// fault with by nobody.
func TestGoodRecordIsQuiet(t *testing.T) {
	good := copper(signed + "family: standard conductors\nproperties:\n  density: {value: 8.89 g/cm³, source: standard}\n  expansion: {value: 17e-6 /K, source: standard}\n  thermal_conductivity: {value: 394 W/(m·K), source: standard}\n")
	if list := examined(good, "2027-01-01"); len(list) > 0 {
		t.Errorf("found %v: %+v", codesOf(list), list[0])
	}
}
