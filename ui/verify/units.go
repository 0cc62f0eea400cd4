package verify

// unitFactors gives the SI value of one published unit. A result in SI is
// divided by it.
func unitFactors() map[string]float64 {
	return map[string]float64{
		"1": 1, "%": 1e-2,
		"m": 1, "um": 1e-6, "nm": 1e-9,
		"Pa": 1, "hPa": 1e2, "kPa": 1e3, "MPa": 1e6,
		"K":   1,
		"N/m": 1, "mN/m": 1e-3,
		"kg/m3": 1, "g/cm3": 1e3,
		"kg": 1, "g": 1e-3,
		"J/kg": 1, "kJ/kg": 1e3, "MJ/kg": 1e6, "J/mol": 1, "kJ/mol": 1e3,
		"m2/s": 1, "1e-5 m2/s": 1e-5, "m2/(V s)": 1,
		"W/(m K)": 1, "mW/(m K)": 1e-3, "1e-2 W/(m K)": 1e-2,
		"Pa s": 1, "uPa s": 1e-6, "1e-5 Pa s": 1e-5,
		"1/Pa": 1, "1e-11/Pa": 1e-11,
		"m3/mol": 1, "cm3/mol": 1e-6,
		"kg/mol": 1, "g/mol": 1e-3, "mol/kg": 1,
		"J/(mol K)": 1, "J/(kg K)": 1, "J/K": 1, "1/mol": 1, "C": 1, "F/m": 1, "m/s2": 1,
	}
}
