package solutes

import "math"

// Ion holds the ion-interaction parameters of one salt at 25 °C (Pitzer &
// Mayorga, J. Phys. Chem. 77, 2300, 1973), β⁰ and β¹ in kg/mol, Cφ in kg²/mol².
// For 2-1 salts that paper prints 4/3 β⁰, 4/3 β¹ and (2^5/2)/3 Cφ; the factors
// are divided out here. One of the two charges is 1: salts of type 2-2 have a third
// parameter β² and the exponents 1.4 and 12 instead of 2 (Brine knows them).
type Ion struct {
	CationCharge int             `json:"cation_charge"`
	AnionCharge  int             `json:"anion_charge"` // without its sign
	Cations      int             `json:"cations"`      // a formula unit
	Anions       int             `json:"anions"`
	Beta0        float64         `json:"beta0"`
	Beta1        float64         `json:"beta1"`
	CPhi         float64         `json:"c_phi"`
	MaxMolality  float64         `json:"max_molality"` // mol/kg, end of the published range
	Temperature  *IonTemperature `json:"temperature,omitempty"`
	PerKelvin    *IonDerivative  `json:"per_kelvin,omitempty"`
	Extended     *ExtendedFit    `json:"extended,omitempty"`
	Source       string          `json:"source"`
	Evidence     Evidence        `json:"evidence"`
}

// IonTemperature holds the terms by which a parameter differs from its value at
// Tr = 298.15 K, four coefficients each for
//
//	1/T - 1/Tr,  ln(T/Tr),  T - Tr,  T² - Tr²
//
// between Low and High (K). Outside, the parameters of the nearer end are held.
type IonTemperature struct {
	Beta0    [4]float64 `json:"beta0"`
	Beta1    [4]float64 `json:"beta1"`
	CPhi     [4]float64 `json:"c_phi"`
	Low      float64    `json:"low"`
	High     float64    `json:"high"`
	Source   string     `json:"source"`
	Evidence Evidence   `json:"evidence"`
}

// IonDerivative holds published derivatives of the parameters by temperature, a
// kelvin. They are carried for the record and used by no model: beyond the range
// of Ion they give nonsense, and dilute solutions hardly need them (0 °C instead
// of 25 °C in A_φ alone changes a critical supersaturation by 0.2 to 0.5 %).
type IonDerivative struct {
	Beta0    float64  `json:"beta0"`
	Beta1    float64  `json:"beta1"`
	CPhi     float64  `json:"c_phi"`
	Source   string   `json:"source"`
	Evidence Evidence `json:"evidence"`
}

// ExtendedFit is a fit of the same form with two more terms, for concentrated
// solutions: Cφ is replaced by C0 + C1 exp(-√I'), √I' in units of the molal ionic
// strength, and D m³ is added to φ. It takes over between JoinLow and JoinHigh
// (mol/kg); both 0: it is used at all molalities.
type ExtendedFit struct {
	Beta0       float64  `json:"beta0"`
	Beta1       float64  `json:"beta1"`
	C0          float64  `json:"c0"`
	C1          float64  `json:"c1"`
	D           float64  `json:"d"`
	MaxMolality float64  `json:"max_molality"`
	JoinLow     float64  `json:"join_low"`
	JoinHigh    float64  `json:"join_high"`
	Source      string   `json:"source"`
	Evidence    Evidence `json:"evidence"`
}

// Number returns ν, the number of ions of a formula unit.
func (i *Ion) Number() int { return i.Cations + i.Anions }

// referenceTemperature is 25 °C, where the parameters were measured.
const referenceTemperature = 298.15

// at returns β⁰, β¹ and Cφ at the temperature T.
func (i *Ion) at(T float64) (beta0, beta1, cPhi float64) {
	if i.Temperature == nil {
		return i.Beta0, i.Beta1, i.CPhi
	}
	T = min(max(T, i.Temperature.Low), i.Temperature.High)
	const Tr = referenceTemperature
	terms := [4]float64{1/T - 1/Tr, math.Log(T / Tr), T - Tr, T*T - Tr*Tr}
	beta0, beta1, cPhi = i.Beta0, i.Beta1, i.CPhi
	for k, x := range terms {
		beta0 += i.Temperature.Beta0[k] * x
		beta1 += i.Temperature.Beta1[k] * x
		cPhi += i.Temperature.CPhi[k] * x
	}
	return beta0, beta1, cPhi
}

// DebyeHueckel rests on values of this range (K), fitted with these coefficients.
const (
	debyeHueckelA    = 1.65817e-03 // 1/K
	debyeHueckelB    = 6.7408e-06  // 1/K²
	debyeHueckelLow  = 273.15
	debyeHueckelHigh = 313.15
)

// DebyeHueckel returns the Debye-Hückel slope A_φ of water for the osmotic
// coefficient at the temperature T (K), in (kg/mol)^½:
//
//	A_φ = 0.3915 (1 + a t + b t²),  t = T - 298.15 K
//
// A quadratic through values computed from the permittivity of Malmberg & Maryott
// 1956 and the density of Kell 1975 from 0 to 40 °C (to 1e-4), scaled to 0.3915
// at 25 °C (Archer & Wang 1990, from memory). Outside that range it extrapolates.
func DebyeHueckel(T float64) float64 {
	t := T - referenceTemperature
	return 0.3915 * (1 + t*(debyeHueckelA+t*debyeHueckelB))
}

// pitzer is the osmotic coefficient of one salt in water at one temperature,
// made ready: all factors that hang on charges and numbers are multiplied in.
//
//	φ = 1 - a s/(1 + 1.2 s) + m (b0 + b1 e^(-2s)) + m² (c0 + c1 e^(-s)) + d m³
//
// with s = √I, I = ion m.
type pitzer struct {
	ion, a, b0, b1, c0, c1, d float64
}

func (i *Ion) pitzer(debyeHueckel, T float64) pitzer {
	beta0, beta1, cPhi := i.at(T)
	p := i.limits(debyeHueckel)
	second, third := i.factors()
	p.b0, p.b1, p.c0 = second*beta0, second*beta1, third*cPhi
	return p
}

func (i *Ion) extended(debyeHueckel float64) pitzer {
	p := i.limits(debyeHueckel)
	second, third := i.factors()
	e := i.Extended
	p.b0, p.b1, p.c0, p.c1, p.d = second*e.Beta0, second*e.Beta1, third*e.C0, third*e.C1, e.D
	return p
}

func (i *Ion) limits(debyeHueckel float64) pitzer {
	zc, za := float64(i.CationCharge), float64(i.AnionCharge)
	return pitzer{
		ion: (float64(i.Cations)*zc*zc + float64(i.Anions)*za*za) / 2,
		a:   zc * za * debyeHueckel,
	}
}

// factors are 2 ν_c ν_a/ν and 2 (ν_c ν_a)^(3/2)/ν.
func (i *Ion) factors() (second, third float64) {
	product, nu := float64(i.Cations*i.Anions), float64(i.Number())
	return 2 * product / nu, 2 * product * math.Sqrt(product) / nu
}

// osmotic returns φ and dφ/d ln m at the molality m.
func (p *pitzer) osmotic(m float64) (phi, slope float64) {
	s := math.Sqrt(p.ion * m)
	root := 1 / (1 + 1.2*s)
	e1 := math.Exp(-s)
	e2 := e1 * e1
	limit := -p.a * s * root
	second := m * (p.b0 + p.b1*e2)
	third := m * m * (p.c0 + p.c1*e1)
	fourth := p.d * m * m * m
	phi = 1 + limit + second + third + fourth
	slope = limit*root/2 + second - m*p.b1*e2*s + 2*third - m*m*p.c1*e1*s/2 + 3*fourth
	return phi, slope
}

// lnGamma returns the logarithm of the mean activity coefficient that belongs to
// osmotic by the Gibbs-Duhem equation; NaN with the terms of an extended fit.
func (p *pitzer) lnGamma(m float64) float64 {
	if p.c1 != 0 || p.d != 0 {
		return math.NaN()
	}
	if m == 0 {
		return 0
	}
	I := p.ion * m
	s := math.Sqrt(I)
	limit := -p.a * (s/(1+1.2*s) + 2/1.2*math.Log1p(1.2*s))
	second := m * (2*p.b0 + p.b1/(2*I)*(1-(1+2*s-2*I)*math.Exp(-2*s)))
	return limit + second + 1.5*p.c0*m*m
}
