package quantity

import (
	"encoding/json"
	"sort"
)

// scriptUnit is one unit as the browser's reader knows it; SI = (x + Offset)·Factor.
type scriptUnit struct {
	Symbol    string   `json:"s"`
	Factor    float64  `json:"f"`
	Offset    float64  `json:"o,omitempty"`
	Spellings []string `json:"n"` // every spelling that folding does not lead to another one of the list
}

// Script writes the unit table as JSON for the browser's reader of
// quantities: how spellings are folded, and the units of every kind but
// prices, which are never converted.
func Script() ([]byte, error) {
	kinds := map[Kind][]scriptUnit{}
	for _, k := range Kinds() {
		if k == Price {
			continue
		}
		spelled := map[string][]string{}
		for s, u := range bySpelling[k] {
			if folded := normalise(s); s == folded || bySpelling[k][folded] != u {
				spelled[u.Symbol] = append(spelled[u.Symbol], s)
			}
		}
		for _, u := range Units(k) {
			sort.Strings(spelled[u.Symbol])
			kinds[k] = append(kinds[k], scriptUnit{u.Symbol, u.factor, u.offset, spelled[u.Symbol]})
		}
	}
	return json.Marshal(struct {
		Folds     []string              `json:"folds"`
		LastFolds [][2]string           `json:"lastFolds"`
		Kinds     map[Kind][]scriptUnit `json:"kinds"`
	}{folds, lastFolds, kinds})
}
