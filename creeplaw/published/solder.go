package published

import "example.com/holdtime/creeplaw"

const (
	solderCaution = generalCaution + "Solder joints differ from bulk solder, and alloys of one name from each other, by an " +
		"order of magnitude; they age. Steady creep only."
	tinSilverCopperBasis = "nominal, -40 to 150 °C as such joints are used (common practice); the range of the tests is not on " +
		"record here"
)

func tinSilverCopperRange() Range {
	return Range{Temperature: Interval{233.15, 423.15}, Basis: tinSilverCopperBasis}
}

// solderSinh is A sinhⁿ(ασ) exp(-(Q/R)/T), with Q/R in K as the sources print it.
func solderSinh(prefactor, alpha, n, activationTemperature float64) creeplaw.Law {
	return arrhenius(known(creeplaw.NewGarofalo(prefactor, alpha, n)), activationTemperature*creeplaw.GasConstant)
}

// SolderSACSchubert is the steady creep of tin–silver–copper solder after Schubert and others, in MPa and s,
//
//	ṗ = 277984 sinh^6.41(0.02447 σ) exp(-6500/T)
func SolderSACSchubert() Set {
	return Set{
		Record: Record{
			Name:     "Sn-Ag-Cu solder, Schubert and others",
			Citation: "A. Schubert and others, Proc. 53rd Electronic Components and Technology Conference, 2003, 603–610",
			Status:   FromMemoryHigh, Units: megapascalSecond, Range: tinSilverCopperRange(), Caution: solderCaution,
		},
		Law: solderSinh(277984, 0.02447, 6.41, 6500),
	}
}

// SolderSACZhang is the steady creep of Sn-3.9Ag-0.6Cu after Zhang, Dasgupta and Haswell, in MPa and s,
//
//	ṗ = 143.4 sinh^3.79(0.108 σ) exp(-7567/T)
func SolderSACZhang() Set {
	return Set{
		Record: Record{
			Name:     "Sn-3.9Ag-0.6Cu solder, Zhang and others",
			Citation: "Q. Zhang, A. Dasgupta, P. Haswell, 2003 (where printed is not on record here)",
			Status:   FromMemoryMedium, Units: megapascalSecond, Range: tinSilverCopperRange(), Caution: solderCaution,
		},
		Law: solderSinh(143.4, 0.108, 3.79, 7567),
	}
}

// SolderSACPang is the steady creep of Sn-3.8Ag-0.7Cu after Pang, Xiong and Low, in MPa and s,
//
//	ṗ = 501.3 sinh^4.96(0.0316 σ) exp(-5433.5/T)
func SolderSACPang() Set {
	return Set{
		Record: Record{
			Name:     "Sn-3.8Ag-0.7Cu solder, Pang and others",
			Citation: "J. H. L. Pang, B. S. Xiong, T. H. Low, 2004 (where printed is not on record here)",
			Status:   FromMemoryMedium, Units: megapascalSecond, Range: tinSilverCopperRange(), Caution: solderCaution,
		},
		Law: solderSinh(501.3, 0.0316, 4.96, 5433.5),
	}
}

// SolderSACWiese is the double power law of Wiese and others for tin–silver–copper solder, in MPa and s,
//
//	ṗ = 4e-7 σ³ exp(-3223/T) + 1e-12 σ¹² exp(-7348/T)
func SolderSACWiese() Set {
	return Set{
		Record: Record{
			Name: "Sn-Ag-Cu solder, double power law, Wiese and others",
			Citation: "S. Wiese and others, as set out in A. Syed, Proc. 54th Electronic Components and Technology Conference, " +
				"2004, 737–746",
			Status: FromMemoryHighMedium, Units: megapascalSecond, Range: tinSilverCopperRange(), Caution: solderCaution,
		},
		Law: known(creeplaw.NewSum(powerLaw(4e-7, 3, 3223*creeplaw.GasConstant), powerLaw(1e-12, 12, 7348*creeplaw.GasConstant))),
	}
}

// SolderTinLead is the steady creep of eutectic tin–lead, Sn-37Pb, in the form after Darveaux and Banerji, in Pa and s,
//
//	ṗ = 926 (508 - T)/T sinh^3.3[σ/(37.78e6 - 74414 T)] exp(-6360/T)
//
// undefined from 507.7 K, where the stress scale vanishes.
func SolderTinLead() Set {
	return Set{
		Record: Record{
			Name:     "Sn-37Pb solder, form after Darveaux and Banerji",
			Citation: "form after R. Darveaux, K. Banerji, IEEE Trans. Components, Hybrids, Manuf. Technol. 15 (1992) 1013–1024",
			Status:   FromMemoryHighMedium,
			Units:    pascalSecond,
			Range: Range{Temperature: Interval{218.15, 423.15},
				Basis: "nominal, -55 to 150 °C as such joints are used (common practice); the range of the tests is not on record here"},
			Caution: solderCaution,
		},
		Law: known(creeplaw.NewDarveauxBanerji(creeplaw.ModulusSinh{
			Prefactor:        926,
			Modulus:          linear(508, -1),
			StressScale:      linear(37.78e6, -74414),
			Exponent:         3.3,
			ActivationEnergy: 6360 * creeplaw.GasConstant,
		})),
	}
}

// linear is a + bT, as printed with its value at absolute zero.
func linear(a, b float64) creeplaw.ShearModulus {
	const reference = 300
	return creeplaw.ShearModulus{Value: a + b*reference, Reference: reference, Slope: b}
}

func solderSets() []Set {
	return []Set{SolderSACSchubert(), SolderSACZhang(), SolderSACPang(), SolderSACWiese(), SolderTinLead()}
}
