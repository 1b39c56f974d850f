package curve_test

import (
	"fmt"

	"ohmfolio/generator/curve"
)

// The change of a shunt alloy over a window: invented constants, α +10 ppm/K and
// β −0.5 ppm/K² about 20 °C.
func ExampleMeasure() {
	alloy := curve.Polynomial{Y0: 0.43e-6, Alpha: 10e-6, Beta: -0.5e-6, Reference: 293.15}
	m, err := curve.Measure(alloy.Curve(233.15, 398.15), 293.15, 293.15, 378.15)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("greatest change %.1f ppm at %.0f °C\n", m.Change.Greatest*1e6, m.Change.GreatestAt-273.15)
	fmt.Printf("turns at %.0f °C with %.0f ppm\n", m.TurningPoints[0].T-273.15, m.TurningPoints[0].Change*1e6)
	// Output:
	// greatest change -2762.5 ppm at 105 °C
	// turns at 30 °C with 50 ppm
}

// A curve tells nothing outside its range.
func ExampleCurve_At() {
	copper := curve.Polynomial{Y0: 1.7241e-8, Alpha: 0.00393, Reference: 293.15}.Curve(273.15, 373.15)
	for _, kelvin := range []float64{323.15, 400} {
		rho, ok := copper.At(kelvin)
		fmt.Printf("%.4g %v\n", rho, ok)
	}
	// Output:
	// 1.927e-08 true
	// NaN false
}
