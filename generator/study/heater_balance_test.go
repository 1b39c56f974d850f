package study

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strconv"
	"strings"
	"testing"
)

// TestHeaterBalance: for any voltage, power, connection, shape and lead-in, the
// design gives back the power asked, R is that of ρ, length and section, the
// load is power over surface, and every band holds its value.
func TestHeaterBalance(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 4))
	pick := func(list ...string) string { return list[random.IntN(len(list))] }
	designs := 0
	for range 300 {
		p := rounded(50 * math.Pow(10, 2*random.Float64()))
		u := rounded(24 * math.Pow(10, random.Float64()))
		block := fmt.Sprintf("voltage: %.3f V ± %.1f %%\npower: %.3f W\nelement_temperature: %.1f °C\nsurface_load: %.3f W/cm²\nstock: no\n", u, 10*random.Float64(), p, 25+190*random.Float64(), 0.5+9*random.Float64())
		connection := pick("single", "star", "delta", "series\nelements: 3")
		leads := 0.1 * random.Float64()
		strands := 1 + random.IntN(2)
		block += "connection: " + connection + fmt.Sprintf("\nlead_ins: {length: %.6f m, strands: %d}\n", leads, strands)
		shape := pick("", "shape: strip\nwidth_to_thickness: 12\n", "shape: strip\nthickness: 0.2 mm\n")
		block += shape + pick("", "resistance_tolerance: ± 5 %\n")
		m := told(t, "heater", "materials: [limited]\n"+block)
		if len(m.Numbers) < 8 { // the lead-ins alone may have too much
			continue
		}
		designs++
		v := func(name string) float64 { return *m.Numbers[name].Value }
		n, share := 3.0, 1.0
		switch connection {
		case "single":
			n = 1
		case "star":
			share = 1 / math.Sqrt(3)
		case "series\nelements: 3":
			share = 1.0 / 3
		}
		area, around := 0.0, 0.0
		if shape == "" {
			area, around = math.Pi/4*v("diameter")*v("diameter"), math.Pi*v("diameter")
		} else {
			area, around = v("thickness")*v("width"), 2*(v("thickness")+v("width"))
		}
		lead := 2 * leads / float64(strands)
		for what, pair := range map[string][2]float64{
			"power":       {v("power"), p},
			"U²/R":        {n * share * share * u * u / v("resistance_hot"), p},
			"R cold":      {v("resistance_cold"), 1.1 * (v("length") + lead) / area},
			"R hot":       {v("resistance_hot"), 1.1 * (v("length")*v("temperature_factor") + lead) / area},
			"load":        {v("surface_load"), p / n / (around * v("length") * 10)},
			"load asked":  {v("surface_load"), askedLoad(block)},
			"wire to cut": {v("wire_length"), v("length") + 2*leads*float64(strands)},
		} {
			if math.Abs(pair[0]/pair[1]-1) > 1e-5 { // the block has six decimals
				t.Fatalf("%s is %g, want %g:\n%s", what, pair[0], pair[1], block)
			}
		}
		for name, x := range m.Numbers {
			if x.Lower != nil && x.Value != nil && (*x.Lower > *x.Value || *x.Upper < *x.Value) {
				t.Fatalf("%s: %g lies outside %g to %g", name, *x.Value, *x.Lower, *x.Upper)
			}
		}
	}
	if designs < 200 {
		t.Errorf("only %d designs", designs)
	}
}

// rounded as the block writes it.
func rounded(x float64) float64 { return math.Round(1000*x) / 1000 }

// askedLoad reads the load back from the block.
func askedLoad(block string) float64 {
	_, rest, _ := strings.Cut(block, "surface_load: ")
	text, _, _ := strings.Cut(rest, " ")
	x, _ := strconv.ParseFloat(text, 64)
	return x
}
