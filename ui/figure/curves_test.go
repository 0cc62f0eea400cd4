package figure

import (
	"fmt"
	"math"
)

// kappaCurve is the equilibrium curve of a dry particle of diameter dry (nm)
// and hygroscopicity kappa at 20 °C: wet radius in µm, supersaturation in %.
// Petters and Kreidenweis 2007, equation 6; surface tension of water 0.0728 N/m
// (from memory), so that the Kelvin length is 4 sigma M/(R T rho) = 2.153 nm.
func kappaCurve(dry, kappa float64, n int) (x, y []float64) {
	for i := range n {
		d := dry * math.Pow(10, 0.001+1.999*float64(i)/float64(n-1))
		x = append(x, d/2000)
		y = append(y, kappaAt(d, dry, kappa))
	}
	// The dense line contains its extremum: put the crest in by bisection of
	// the slope between the neighbours of the highest point.
	top := 0
	for i := range y {
		if y[i] > y[top] {
			top = i
		}
	}
	lo, hi := 2000*x[max(top-1, 0)], 2000*x[min(top+1, n-1)]
	for range 80 {
		a, b := lo+(hi-lo)/3, hi-(hi-lo)/3
		if kappaAt(a, dry, kappa) < kappaAt(b, dry, kappa) {
			lo = a
		} else {
			hi = b
		}
	}
	x[top], y[top] = lo/2000, kappaAt(lo, dry, kappa)
	return x, y
}

func kappaAt(d, dry, kappa float64) float64 {
	const kelvin = 2.153
	dry3, d3 := dry*dry*dry, d*d*d
	return 100 * ((d3-dry3)/(d3-dry3*(1-kappa))*math.Exp(kelvin/d) - 1)
}

func crestOf(x, y []float64) (cx, cy float64) {
	cy = math.Inf(-1)
	for i := range y {
		if y[i] > cy {
			cx, cy = x[i], y[i]
		}
	}
	return cx, cy
}

// crestFigure is the Curve page's figure for one dry diameter in nm.
func crestFigure(dry, kappa float64) Figure {
	x, y := kappaCurve(dry, kappa, 400)
	cx, cy := crestOf(x, y)
	return Figure{
		Key: "curve", Title: "supersaturation, % against wet radius, µm",
		X:     Axis{Says: "wet radius", Unit: "µm", Log: true},
		Y:     Axis{Says: "supersaturation", Unit: "%"},
		Lines: []Line{{X: x, Y: y, Crest: true}},
		Marks: []Mark{{Kind: CrestMark, X: cx, Y: cy, Text: fmt.Sprintf("%.3f %%", cy)}},
	}
}

// withHaze marks the haze size, where the curve is at the humidity (%).
func withHaze(f Figure, humidity float64) Figure {
	l := f.Lines[0]
	for i := 1; i < len(l.X); i++ {
		if s := humidity - 100; l.Y[i-1] < s && l.Y[i] >= s {
			f.Marks = append(f.Marks, Mark{
				Kind: HazeMark, X: l.X[i], Y: l.Y[i],
				Text: fmt.Sprintf("haze %.3f µm at %.1f %%", l.X[i], humidity),
			})
			break
		}
	}
	return f
}

func withHeld(f Figure, letter rune, dry, kappa float64) Figure {
	x, y := kappaCurve(dry, kappa, 400)
	f.Lines = append(f.Lines, Line{Letter: letter, Says: "held", Dash: Dashed, X: x, Y: y, Crest: true})
	return f
}

// withOthers adds the Kelvin-only and the Raoult-only line.
func withOthers(f Figure, dry, kappa float64) Figure {
	l := f.Lines[0]
	kelvin := Line{Says: "Kelvin only", Dash: Dotted, X: l.X}
	raoult := Line{Says: "Raoult only", Dash: Dotted, X: l.X}
	for _, r := range l.X {
		d := 2000 * r
		k := 100 * (math.Exp(2.153/d) - 1)
		kelvin.Y = append(kelvin.Y, k)
		raoult.Y = append(raoult.Y, (100+kappaAt(d, dry, kappa))/(1+k/100)-100)
	}
	f.Lines = append(f.Lines, kelvin, raoult)
	return f
}
