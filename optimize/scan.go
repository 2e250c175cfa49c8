package optimize

// scanner walks through the designs of a space of whole numbers and choices one by one, to find those that
// chance has left out when hardly any are left.
type scanner struct {
	at int // designs looked at
}

// scanLimit is the largest space that is walked through.
const scanLimit = 1 << 20

// next writes the next design that is not known to x and reports whether there was one.
func (c *scanner) next(x []float64, sp *space, known func([]float64) bool) bool {
	if sp.size > scanLimit {
		return false
	}
	for float64(c.at) < sp.size {
		rest := c.at
		c.at++
		for k, v := range sp.vars {
			m := int(sp.levels[k])
			x[k] = v.Low + float64(rest%m)
			rest /= m
		}
		if !known(x) {
			return true
		}
	}
	return false
}
