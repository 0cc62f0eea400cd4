package solutes

// Evidence says how a catalogued value came to be known.
type Evidence string

const (
	Read     Evidence = "read"     // read in a published page
	Memory   Evidence = "memory"   // from memory of the named publication
	Computed Evidence = "computed" // derived from other values here
	User     Evidence = "user"     // given by the user
)

// Datum is one catalogued value and where it comes from. The zero Datum is a
// gap: the value is not known.
type Datum struct {
	Value    float64  `json:"value"`
	Low      float64  `json:"low,omitempty"` // published bounds, 0: none given
	High     float64  `json:"high,omitempty"`
	Source   string   `json:"source"`
	Evidence Evidence `json:"evidence"`
}

// Known reports whether there is a value.
func (d Datum) Known() bool { return d.Evidence != "" }

// Substance is one entry of the catalogue. SI units; a gap is a zero Datum.
type Substance struct {
	Key     string   `json:"key"`     // "ammonium_sulfate"
	Name    string   `json:"name"`    // "ammonium sulfate"
	Formula string   `json:"formula"` // "(NH4)2SO4"
	Aliases []string `json:"aliases,omitempty"`

	MolarMass        Datum `json:"molar_mass"`        // kg/mol
	Density          Datum `json:"density"`           // kg/m³, dry
	Ions             Datum `json:"ions"`              // formal number of ions ν; 0: insoluble
	Kappa            Datum `json:"kappa"`             // at activation
	KappaGrowth      Datum `json:"kappa_growth"`      // from growth factors below saturation
	Solubility       Datum `json:"solubility"`        // kg per kg of water, 25 °C
	VolumeSolubility Datum `json:"volume_solubility"` // C, m³ of solute per m³ of water
	Deliquescence    Datum `json:"deliquescence"`     // relative humidity 0..1, 25 °C
	Efflorescence    Datum `json:"efflorescence"`     // relative humidity 0..1
	TensionIncrement Datum `json:"tension_increment"` // N/m per mol/kg
	ShapeFactor      Datum `json:"shape_factor"`      // dynamic shape factor of the dry particle

	Ion          *Ion          `json:"ion,omitempty"`          // ion-interaction parameters
	Concentrated *Concentrated `json:"concentrated,omitempty"` // published polynomial and its join

	Remarks []string `json:"remarks,omitempty"`
}
