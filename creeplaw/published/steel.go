package published

import "example.com/holdtime/creeplaw"

// Steel316At600C is Norton's law for type 316 steel at 600 °C, in MPa and h,
//
//	ṗ = 1.47e-29 σ^10.147
//
// for use with E = 148000 MPa and ν = 0.3 as printed beside it.
func Steel316At600C() Set {
	return Set{
		Record: Record{
			Name:     "316 stainless steel at 600 °C, Norton",
			Citation: "13th International Conference on Fracture, Beijing 2013, paper 1381, table 2",
			Status:   Verified,
			Units:    megapascalHour,
			Range: Range{Temperature: Interval{873.15, 873.15},
				Basis: "the one temperature of the source; the stresses of its tests are not on record here"},
			Caution: generalCaution + "One temperature: the law does not depend on it. The columns of the table were told " +
				"apart by their order in the extracted text.",
		},
		Law: known(creeplaw.NewNorton(1.47e-29, 10.147)),
	}
}

// Grade91Swindeman is the minimum creep rate of 9Cr-1Mo-V steel, grade 91, in the form of Swindeman, in MPa and h,
//
//	ṗ = 2.25e20 exp(0.038 σ) σ⁵ exp(-77280/T)
//
// The source prints 2.25e22 for a rate in per cent per hour.
func Grade91Swindeman() Set {
	power := known(creeplaw.NewPowerExponential(2.25e22/100, 5, 1/0.038))
	return Set{
		Record: Record{
			Name:     "9Cr-1Mo-V steel (grade 91), minimum rate, Swindeman",
			Citation: "R. W. Swindeman, ASME PVP-391 (1999) 95–100",
			Status:   FromMemoryMedium,
			Units:    megapascalHour,
			Range: Range{Temperature: Interval{773.15, 923.15},
				Basis: "from memory, confidence low: 500–650 °C; the range of the tests is not on record here"},
			Caution: generalCaution + "Minimum rate only: no primary and no tertiary creep. Welds and over-tempered material " +
				"creep much faster.",
		},
		Law: arrhenius(power, 77280*creeplaw.GasConstant),
	}
}

func steelSets() []Set { return []Set{Steel316At600C(), Grade91Swindeman()} }
