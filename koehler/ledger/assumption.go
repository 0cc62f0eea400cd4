package ledger

// Key names an assumption in the word that scripts see.
type Key string

// The assumptions behind the answer about one particle.
const (
	VapourPressureChange    Key = "vapour_pressure_change"
	IncompressibleLiquid    Key = "incompressible_liquid"
	FlatSurfaceTension      Key = "flat_surface_tension"
	ConstantKappa           Key = "constant_kappa"
	IdealSolute             Key = "ideal_solute"
	PureWaterSurfaceTension Key = "pure_water_surface_tension"
	Convention25C           Key = "convention_25c"
	VolumeAdditivity        Key = "volume_additivity"
	Sphere                  Key = "sphere"
	TextbookCubic           Key = "textbook_cubic"
	CompleteDissolution     Key = "complete_dissolution"
)

// Assumption is one simplification that an answer may make.
type Assumption struct {
	Key      Key
	Says     string // in a few words
	Explains string // in two sentences
	Source   string
	row      func(b *book) Row
}

// Find returns the assumption of that key.
func Find(k Key) (Assumption, bool) {
	for _, a := range Assumptions() {
		if a.Key == k {
			return a, true
		}
	}
	return Assumption{}, false
}

// Assumptions returns all assumptions in the order of the rows.
func Assumptions() []Assumption {
	return []Assumption{
		{VapourPressureChange, "the vapour keeps its pressure",
			"The Kelvin equation drops the change of the vapour's own pressure beside the pressure jump at the drop's surface. " +
				"In air of a fixed total pressure that term does not exist; in pure vapour it is about 0.002 %.",
			"exact Kelvin equation of a drop in its own vapour; vapour pressure by Murphy & Koop 2005, Q. J. R. Meteorol. Soc. 131, 1539", vapourRow},
		{IncompressibleLiquid, "water cannot be compressed",
			"Its curved surface puts the water of a small drop under some to tens of bar, so that a mole of it takes a little less room and feels the curvature less. " +
				"Leaving that out makes the barrier too high, noticeably only for dry particles below some 20 nm.",
			"compressibility by Kell 1975, J. Chem. Eng. Data 20, 97, integrated over the Laplace pressure", incompressibleRow},
		{FlatSurfaceTension, "the tension of a flat surface",
			"Tables give the tension of a flat surface; that of a very small drop differs by Tolman's length over its radius. " +
				"That length is disputed even in its sign, so the cost is known only for the length that you give.",
			"Tolman 1949, J. Chem. Phys. 17, 333; -0.056 nm from a simulation with TIP4P/2005 water at 300 K for radii of 0.7 to 1.6 nm", flatRow},
		{ConstantKappa, "one κ at every dilution",
			"κ is one number for a substance, but the solution that it stands for is stronger in the drop of a small particle than in that of a large one. " +
				"The tabulated κ is right near one size only: below it the barrier comes out too low, above it too high.",
			"Petters & Kreidenweis 2007, Atmos. Chem. Phys. 7, 1961; against ion interaction, Pitzer & Mayorga 1973, J. Phys. Chem. 77, 2300", kappaRow},
		{IdealSolute, "every ion counts in full (i = ν)",
			"An ideal solution takes each ion of a salt, and each molecule of an organic, as one free particle. " +
				"Real ones hold on to each other, so fewer count, and the ideal particle takes up too much water.",
			"van 't Hoff's factor as the number of ions; common textbook practice", idealRow},
		{PureWaterSurfaceTension, "the surface tension of pure water",
			"Dissolved salts raise the surface tension and surface-active organics lower it, most in small drops because these are the most concentrated. " +
				"Taking pure water at the drop's temperature leaves that out.",
			"IAPWS R1-76(2014); increments per molality of the catalogue's substances", pureWaterRow},
		{Convention25C, "72.0 mN/m and 25 °C throughout",
			"Most published κ are worked out with 72.0 mN/m and 25 °C, and are then used at other temperatures. " +
				"The barrier follows the surface tension over the temperature to the power 1.5, some 0.8 % for each kelvin; what the solute does to the surface tension is left out too.",
			"convention of Petters & Kreidenweis 2007, Atmos. Chem. Phys. 7, 1961", conventionRow},
		{VolumeAdditivity, "water and dry particle add their volumes",
			"The drop is taken to be as large as the dry particle and the water side by side, but dissolved ions pull water together. " +
				"The measured density of the solution tells the drop's true size.",
			"Tang & Munkelwitz 1994, J. Geophys. Res. 99, 18801; Tang 1996, J. Geophys. Res. 101, 19245", additiveRow},
		{Sphere, "the dry particle is a sphere",
			"A classifier measures mobility, and an angular particle holds less matter than the sphere of the same mobility. " +
				"Taking it for a sphere overstates its solute, so the barrier comes out too low.",
			"DeCarlo et al. 2004, Aerosol Sci. Technol. 38, 1185; slip correction of ISO 15900", sphereRow},
		{TextbookCubic, "the textbook cubic s = A/D - B/D³",
			"The textbook form takes the drop as very dilute and ideal, the tension as that of pure water, and e^x as 1 + x, which gives the closed crest s = √(4A³/27B). " +
				"It holds for large soluble particles and fails where the drop at its crest is not much larger than the dry particle.",
			"common textbook form; Petters & Kreidenweis 2007, eq. 10", textbookRow},
		{CompleteDissolution, "all that can dissolve is dissolved at once",
			"A sparingly soluble substance dissolves only as water comes in, so a dry particle may have to cross a first barrier with hardly any solute. " +
				"Taking all of it as dissolved holds for a drop that came from higher humidity, not for one that starts dry.",
			"Petters & Kreidenweis 2008, Atmos. Chem. Phys. 8, 6273", dissolutionRow},
	}
}
