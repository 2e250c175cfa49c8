package studies

import (
	"math"

	"hotfront/model"
	"hotfront/model/metal"
)

// exchangerFields are heater, regenerator, cooler, the wall of the hot cylinder and ducts. A field
// that another one follows stands before it. Defaults and usual ranges: see machineFields.
func exchangerFields() []Field {
	rows := []Field{
		whole("heater.tube_count", "heater tubes in parallel", "1 to 10000", "10 to 600",
			func(e *model.Engine) *int { return &e.Heater.TubeCount }),
		measured("heater.tube_bore", "bore of a heater tube", Length, "mm", "0.2 mm to 200 mm", "1.5 mm to 10 mm",
			func(e *model.Engine) *float64 { return &e.Heater.TubeBore }),
		measured("heater.tube_wall", "wall thickness of a heater tube", Length, "mm", "0.05 mm to 50 mm", "0.3 mm to 3 mm",
			func(e *model.Engine) *float64 { return &e.Heater.TubeWall }),
		measured("heater.tube_length", "length of a heater tube from header to header", Length, "mm", "5 mm to 10 m", "80 mm to 700 mm",
			func(e *model.Engine) *float64 { return &e.Heater.TubeLength }),
		measured("heater.heated_length", "part of that length that takes up heat; the whole when neither it nor unheated_length is given", Length, "mm", "1 mm to 10 m", "60 mm to 700 mm",
			func(e *model.Engine) *float64 { return &e.Heater.HeatedLength }, follows("heater.tube_length"), group("heated")),
		{
			Path: "heater.unheated_length", Text: "length of a heater tube that takes up no heat, both ends together; in place of heated_length",
			Quantity: Length, Unit: "mm", Hard: parseRange("0 mm to 10 m", Length), Usual: parseRange("0 mm to 300 mm", Length),
			Group: "heated", Freeable: true,
			get: func(e *model.Engine) float64 { return lessLength(e.Heater.TubeLength, e.Heater.HeatedLength) },
			set: func(e *model.Engine, v float64) { e.Heater.HeatedLength = e.Heater.TubeLength - v },
		},
		measured("heater.end_loss", "loss coefficients of entry, exit and bends of a heater tube together", Number, "-", "0 to 50", "0.5 to 6",
			func(e *model.Engine) *float64 { return &e.Heater.EndLoss }, defaults("1.5")),
		choice("heater.alloy", "alloy of the heater tubes (UNS number)", alloyNames(),
			func(e *model.Engine) *metal.Alloy { return &e.Heater.Alloy }),
		whole("heater.rows", "circles on which the heater tubes stand, one behind the other in the gas of a burner, equally filled", "1 to 20", "1 to 5",
			func(e *model.Engine) *int { return &e.Heater.Rows }, defaults("1")),
		measured("heater.ring_diameter", "circle on which the heater tubes stand, the mean of several; 0 leaves their fit unchecked", Length, "mm", "0 mm to 10 m", "",
			func(e *model.Engine) *float64 { return &e.Heater.RingDiameter }, defaults("0 mm")),
		measured("heater.flux_peaking", "largest local heat flux over the mean", Number, "-", "1 to 10", "1 to 3",
			func(e *model.Engine) *float64 { return &e.Heater.FluxPeaking }, defaults("1.3")),
		measured("heater.design_life", "life at temperature and pressure that the allowable stress is for", Duration, "h", "1 h to 1e6 h", "1000 h to 200000 h",
			func(e *model.Engine) *float64 { return &e.Heater.DesignLife }, defaults("40000 h")),
		measured("heater.stress_factor", "creep rupture stress over allowable stress", Number, "-", "1 to 20", "1.2 to 4", // default from memory
			func(e *model.Engine) *float64 { return &e.Heater.StressFactor }, defaults("1.5")),

		choice("regenerator.kind", "matrix of the regenerator", matrixNames(),
			func(e *model.Engine) *model.MatrixKind { return &e.Regenerator.Kind }, defaults("woven-screen")),
		whole("regenerator.count", "equal canisters in parallel", "1 to 200", "1 to 16",
			func(e *model.Engine) *int { return &e.Regenerator.Count }, defaults("1")),
		measured("regenerator.diameter", "outer diameter of the matrix in one canister", Length, "mm", "1 mm to 5 m", "15 mm to 600 mm",
			func(e *model.Engine) *float64 { return &e.Regenerator.Diameter }),
		measured("regenerator.inner_diameter", "inner diameter of an annular matrix, 0 for a full cylinder", Length, "mm", "0 mm to 5 m", "",
			func(e *model.Engine) *float64 { return &e.Regenerator.InnerDiameter }, defaults("0 mm")),
		measured("regenerator.length", "length of the matrix", Length, "mm", "1 mm to 2 m", "15 mm to 120 mm",
			func(e *model.Engine) *float64 { return &e.Regenerator.Length }),
		measured("regenerator.wire_diameter", "wire or fibre diameter", Length, "mm", "0.002 mm to 5 mm", "0.02 mm to 0.25 mm",
			func(e *model.Engine) *float64 { return &e.Regenerator.WireDiameter }),
		measured("regenerator.porosity", "share of the matrix that is open", Number, "-", "0.25 to 0.98", "0.55 to 0.92",
			func(e *model.Engine) *float64 { return &e.Regenerator.Porosity }),
		choice("regenerator.alloy", "alloy of the matrix (UNS number)", alloyNames(),
			func(e *model.Engine) *metal.Alloy { return &e.Regenerator.Alloy }, defaults("S30400")),
		measured("regenerator.canister_wall", "wall thickness of a canister", Length, "mm", "0.05 mm to 100 mm", "0.5 mm to 20 mm",
			func(e *model.Engine) *float64 { return &e.Regenerator.CanisterWall }, defaults("1.5 mm")),
		choice("regenerator.canister_alloy", "alloy of the canisters (UNS number); that of the heater when not given", alloyNames(),
			func(e *model.Engine) *metal.Alloy { return &e.Regenerator.CanisterAlloy }, follows("heater.alloy")),

		whole("cooler.tube_count", "cooler tubes in parallel", "1 to 100000", "20 to 2000",
			func(e *model.Engine) *int { return &e.Cooler.TubeCount }),
		measured("cooler.tube_bore", "bore of a cooler tube", Length, "mm", "0.2 mm to 200 mm", "0.7 mm to 6 mm",
			func(e *model.Engine) *float64 { return &e.Cooler.TubeBore }),
		measured("cooler.tube_wall", "wall thickness of a cooler tube", Length, "mm", "0.05 mm to 20 mm", "0.1 mm to 2 mm",
			func(e *model.Engine) *float64 { return &e.Cooler.TubeWall }, defaults("0.5 mm")),
		measured("cooler.tube_length", "length of a cooler tube", Length, "mm", "2 mm to 10 m", "30 mm to 400 mm",
			func(e *model.Engine) *float64 { return &e.Cooler.TubeLength }),
		measured("cooler.cooled_length", "part of that length that gives off heat; the whole when neither it nor uncooled_length is given", Length, "mm", "1 mm to 10 m", "20 mm to 400 mm",
			func(e *model.Engine) *float64 { return &e.Cooler.CooledLength }, follows("cooler.tube_length"), group("cooled")),
		{
			Path: "cooler.uncooled_length", Text: "length of a cooler tube that gives off no heat, both ends together; in place of cooled_length",
			Quantity: Length, Unit: "mm", Hard: parseRange("0 mm to 10 m", Length), Usual: parseRange("0 mm to 100 mm", Length),
			Group: "cooled", Freeable: true,
			get: func(e *model.Engine) float64 { return lessLength(e.Cooler.TubeLength, e.Cooler.CooledLength) },
			set: func(e *model.Engine, v float64) { e.Cooler.CooledLength = e.Cooler.TubeLength - v },
		},
		measured("cooler.end_loss", "loss coefficients of entry, exit and bends of a cooler tube together", Number, "-", "0 to 50", "0.5 to 6",
			func(e *model.Engine) *float64 { return &e.Cooler.EndLoss }, defaults("1.5")),
		choice("cooler.alloy", "alloy of the cooler tubes (UNS number)", alloyNames(),
			func(e *model.Engine) *metal.Alloy { return &e.Cooler.Alloy }, defaults("S31600")),
		measured("cooler.shell_diameter", "inner diameter of the shell round the cooler tubes; 0 leaves their fit unchecked", Length, "mm", "0 mm to 10 m", "",
			func(e *model.Engine) *float64 { return &e.Cooler.ShellDiameter }, defaults("0 mm")),

		measured("cylinder.wall", "thickness of the cylinder wall round the hot body", Length, "mm", "0.1 mm to 200 mm", "1 mm to 20 mm",
			func(e *model.Engine) *float64 { return &e.Cylinder.Wall }, defaults("4 mm")),
		choice("cylinder.alloy", "alloy of that wall (UNS number); that of the heater when not given", alloyNames(),
			func(e *model.Engine) *metal.Alloy { return &e.Cylinder.Alloy }, follows("heater.alloy")),
	}
	rows = append(rows, ductFields("expansion_duct", "between expansion space and heater", func(e *model.Engine) *model.Duct { return &e.ExpansionDuct })...)
	rows = append(rows, ductFields("hot_duct", "between heater and regenerator", func(e *model.Engine) *model.Duct { return &e.HotDuct })...)
	rows = append(rows, ductFields("cold_duct", "between regenerator and cooler", func(e *model.Engine) *model.Duct { return &e.ColdDuct })...)
	return append(rows, ductFields("compression_duct", "between cooler and compression space", func(e *model.Engine) *model.Duct { return &e.CompressionDuct })...)
}

// lessLength is the difference of two lengths to a picometre: 300 mm less 250 mm is 50 mm and not
// 49.999999999999986 mm.
func lessLength(a, b float64) float64 { return math.Round((a-b)*1e12) / 1e12 }

func ductFields(prefix, place string, at func(*model.Engine) *model.Duct) []Field {
	return []Field{
		measured(prefix+".volume", "gas volume "+place+", 0 for none", Volume, "cm3", "0 cm3 to 100 l", "",
			func(e *model.Engine) *float64 { return &at(e).Volume }, defaults("0 cm3")),
		measured(prefix+".area", "flow area "+place, Area, "mm2", "0 mm2 to 10 m2", "",
			func(e *model.Engine) *float64 { return &at(e).Area }, defaults("0 mm2")),
		measured(prefix+".loss", "loss coefficient "+place+", on the dynamic pressure in its area", Number, "-", "0 to 100", "",
			func(e *model.Engine) *float64 { return &at(e).Loss }, defaults("0")),
	}
}
