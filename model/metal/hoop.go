package metal

// HoopStressBore gives the hoop stress [Pa] at the bore of a thick-walled tube under inner and
// outer pressure, tension positive:
//
//	s = (pi (ro^2 + ri^2) - 2 po ro^2) / (ro^2 - ri^2)
//
// pInner, pOuter pressures [Pa]; rInner, rOuter radii [m]. Elastic, no thermal stress. It is the
// largest hoop stress of the wall when pInner > pOuter. For a thin wall it tends to
// (pi - po) r/wall.
//
// Source: [Timoshenko1956], chapter on thick-walled cylinders, from memory; the tests check it by
// equilibrium
func HoopStressBore(pInner, pOuter, rInner, rOuter float64) float64 {
	i2, o2 := rInner*rInner, rOuter*rOuter
	return (pInner*(o2+i2) - 2*pOuter*o2) / (o2 - i2)
}
