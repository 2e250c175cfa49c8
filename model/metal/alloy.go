package metal

// Alloy names an alloy by its UNS number.
type Alloy uint8

const (
	N06230 Alloy = iota // nickel-chromium-tungsten
	N06625              // nickel-chromium-molybdenum-niobium
	N06002              // nickel-chromium-iron-molybdenum
	N06600              // nickel-chromium-iron
	N06601              // nickel-chromium-iron-aluminium
	N08810              // iron-nickel-chromium, coarse grain
	N08330              // iron-nickel-chromium-silicon
	S30400              // austenitic stainless steel 304
	S30815              // austenitic stainless steel with cerium and nitrogen
	S31000              // austenitic stainless steel 310
	S31600              // austenitic stainless steel 316
	alloyCount
)

// Alloys returns every alloy, in the order of the constants.
func Alloys() []Alloy {
	all := make([]Alloy, alloyCount)
	for i := range all {
		all[i] = Alloy(i)
	}
	return all
}

// String returns the UNS number, which study files use.
func (a Alloy) String() string {
	switch a {
	case N06230:
		return "N06230"
	case N06625:
		return "N06625"
	case N06002:
		return "N06002"
	case N06600:
		return "N06600"
	case N06601:
		return "N06601"
	case N08810:
		return "N08810"
	case N08330:
		return "N08330"
	case S30400:
		return "S30400"
	case S30815:
		return "S30815"
	case S31000:
		return "S31000"
	case S31600:
		return "S31600"
	}
	return "unknown alloy"
}

// Properties are the data of one alloy.
type Properties struct {
	Alloy     Alloy
	PlainName string // family and common number
	Sources   string // keys of the bibliography

	Density float64 // at 20 degC [kg/m3]

	Conductivity0 float64 // k = Conductivity0 + Conductivity1 T [W/(m K)]
	Conductivity1 float64 // [W/(m K2)]
	SpecificHeat0 float64 // c = SpecificHeat0 + SpecificHeat1 T [J/(kg K)]
	SpecificHeat1 float64 // [J/(kg K2)]
	Expansion0    float64 // mean from 20 degC to T: Expansion0 + Expansion1 (T - 273.15) [1/K]
	Expansion1    float64 // [1/K2]
	Young0        float64 // E = Young0 + Young1 (T - 273.15) [Pa]
	Young1        float64 // [Pa/K]

	Rupture Rupture
	Yield   Strength // 0.2 % yield strength
	Tensile Strength // short-time tensile strength
}

// Rupture is a fit of the creep rupture stress to the Larson-Miller parameter P:
//
//	log10 s = C[0] + C[1] z + C[2] z^2 + C[3] z^3,  z = P/1000 - 25,  s in Pa
type Rupture struct {
	C    [4]float64 // [log10 Pa] against P/1000 - 25
	Low  float64    // smallest parameter among the rows of the fit [kK]
	High float64    // largest parameter among the rows of the fit [kK]
	Rows int        // rows in the fit

	Scatter float64 // of the rows about the fit, standard deviation on stress [-]
}

// Strength is a short-time strength at 20, 300, 500, 650, 800 and 950 degC [Pa].
type Strength [6]float64

// Conductivity gives the thermal conductivity [W/(m K)] at T [K], for 290 to 1250 K.
func (p *Properties) Conductivity(T float64) float64 { return p.Conductivity0 + p.Conductivity1*T }

// SpecificHeat gives the specific heat [J/(kg K)] at T [K], for 290 to 1250 K.
func (p *Properties) SpecificHeat(T float64) float64 { return p.SpecificHeat0 + p.SpecificHeat1*T }

// Expansion gives the mean coefficient of expansion [1/K] from 20 degC to T [K], up to 1250 K.
func (p *Properties) Expansion(T float64) float64 { return p.Expansion0 + p.Expansion1*(T-273.15) }

// Young gives the modulus of elasticity [Pa] at T [K], for 290 to 1250 K.
func (p *Properties) Young(T float64) float64 { return p.Young0 + p.Young1*(T-273.15) }

// Of returns the data of an alloy.
func Of(a Alloy) Properties {
	if a < S30400 {
		return nickel(a)
	}
	return stainless(a)
}
