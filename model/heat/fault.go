package heat

// Fault says why there is no result. OK is the zero value. It is plain data, so that a failed design costs
// nothing; Error makes it usable as an error.
type Fault uint8

const (
	OK                 Fault = iota
	BadNumber                // a quantity is not finite, has the wrong sign or no possible size
	BadShare                 // a share, an effectiveness or an emittance outside its range
	SharesNotOne             // the shares of the fuel do not add up to 1
	NoBurning                // the fuel needs no oxygen
	NoHeatingValue           // heating value not given, and the composition outside the range of the estimate
	TooLittleAir             // excess-air ratio below 1
	TemperatureRange         // a temperature outside the range of the gas properties
	BankImpossible           // pitches, tubes or fins of the bank that cannot be made
	PitchRange               // pitches of an in-line bank outside its law
	ReynoldsRange            // Reynolds number of the bank outside its law
	FinRange                 // annular fins outside the approximation of their efficiency
	TransferImpossible       // effectiveness that no number of transfer units reaches
	TooCold                  // the heat source is too cold for this heat and temperature
	NoConvergence            // an iteration did not settle
	LossFree                 // nothing limits the temperature of the receiver
)

// String says the fault in words.
func (f Fault) String() string {
	switch f {
	case OK:
		return ""
	case BadNumber:
		return "a quantity of the heat source is not finite, has the wrong sign or no possible size"
	case BadShare:
		return "a share, an effectiveness or an emittance is outside its range"
	case SharesNotOne:
		return "shares of the fuel do not add up to 1"
	case NoBurning:
		return "fuel needs no oxygen"
	case NoHeatingValue:
		return "heating value not given and composition outside the range of the estimate"
	case TooLittleAir:
		return "excess-air ratio below 1"
	case TemperatureRange:
		return "temperature outside the range of the gas properties"
	case BankImpossible:
		return "pitches, tubes or fins of the tube bank cannot be made"
	case PitchRange:
		return "in-line tube bank with transverse pitch below 0.7 of the longitudinal: outside its law"
	case ReynoldsRange:
		return "Reynolds number of the tube bank outside its law"
	case FinRange:
		return "annular fins less than half effective or too high for the approximation of their efficiency"
	case TransferImpossible:
		return "effectiveness that no heat exchanger reaches"
	case TooCold:
		return "heat source too cold for this heat and temperature"
	case NoConvergence:
		return "balance of the heat source not found"
	case LossFree:
		return "receiver without losses has no stagnation temperature"
	}
	return "unknown fault of the heat source"
}

// Error makes a fault usable as an error.
func (f Fault) Error() string { return f.String() }

// finite tells whether x is a number of a size that an input in SI units can have; beyond it sums and fourth
// powers would lose all digits.
func finite(x float64) bool { return x <= 1e12 && x >= -1e12 }

// share tells whether x is in 0..1.
func share(x float64) bool { return x >= 0 && x <= 1 }
