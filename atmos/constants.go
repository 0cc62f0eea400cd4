package atmos

// Physical constants in SI units. Constants lists them with their sources.
const (
	GasConstant        = 8.31446261815324 // molar gas constant R, J/(mol K); exact
	Boltzmann          = 1.380649e-23     // J/K; exact
	Avogadro           = 6.02214076e23    // 1/mol; exact
	ElementaryCharge   = 1.602176634e-19  // C; exact
	VacuumPermittivity = 8.8541878128e-12 // F/m; relative uncertainty 1.5e-10
	WaterMolarMass     = 0.01801528       // kg/mol; conventional, 4e-7 kg/mol
	DryAirMolarMass    = 0.0289647        // kg/mol; conventional, 2e-6 kg/mol
	Gravity            = 9.80665          // standard acceleration of free fall, m/s2; exact by convention
	ZeroCelsius        = 273.15           // K; exact by definition
	StandardPressure   = 101325.0         // one standard atmosphere, Pa; exact by definition
)

// Constant is one physical constant as results quote it.
type Constant struct {
	Key    string // stable key for scripts, with the unit
	Name   string
	Value  float64 // in Unit
	Unit   string
	Source string
	Exact  bool // true when it has no uncertainty: defined or agreed upon
}

// Constants returns the constants of this package with their sources, in the
// order in which they are declared. The slice is the caller's own.
func Constants() []Constant {
	const codata = "CODATA 2018, SI Brochure (BIPM, 2019)"
	return []Constant{
		{"molar_gas_constant_j_per_mol_k", "molar gas constant", GasConstant, "J/(mol K)", codata, true},
		{"boltzmann_constant_j_per_k", "Boltzmann constant", Boltzmann, "J/K", codata, true},
		{"avogadro_constant_per_mol", "Avogadro constant", Avogadro, "1/mol", codata, true},
		{"elementary_charge_c", "elementary charge", ElementaryCharge, "C", codata, true},
		{"vacuum_permittivity_f_per_m", "vacuum electric permittivity", VacuumPermittivity, "F/m", "CODATA 2018", false},
		{"water_molar_mass_kg_per_mol", "molar mass of water", WaterMolarMass, "kg/mol",
			"IUPAC standard atomic weights, conventional value", false},
		{"dry_air_molar_mass_kg_per_mol", "molar mass of dry air", DryAirMolarMass, "kg/mol",
			"conventional value; CIPM-2007 has 0.02896546 at 400 ppm of CO2", false},
		{"standard_gravity_m_per_s2", "standard acceleration of free fall", Gravity, "m/s2",
			"3rd CGPM (1901)", true},
		{"zero_celsius_k", "zero of the Celsius scale", ZeroCelsius, "K", "SI Brochure (BIPM, 2019)", true},
		{"standard_pressure_pa", "standard atmosphere", StandardPressure, "Pa", "10th CGPM (1954)", true},
	}
}
