package published

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// iceRange: the temperatures of the tables; stresses as glaciers have them.
func iceRange() Range {
	return Range{
		Stress:      Interval{2e4, 5e5},
		Temperature: Interval{223.15, 273.15},
		Basis: "temperatures of the source's table, -50 to 0 °C; stresses of glaciers as common practice has them, " +
			"beyond which n = 3 is not expected to hold",
	}
}

// fromGlen turns the coefficient A of Glen's flow law, rate_ij = A τⁿ⁻¹ s_ij with τ² = ½ s:s, into that of the uniaxial rate
// under the von Mises stress, 2A/3^((n+1)/2).
func fromGlen(coefficient, n float64) float64 { return 2 * coefficient / math.Pow(3, (n+1)/2) }

// IceCuffeyPaterson is Glen's flow law for glacier ice with the coefficients of Cuffey and Paterson,
//
//	ṗ = (2/9) A σ³,   A = 3.5e-25 exp[-(Q/R)(1/T - 1/263.15)] s⁻¹ Pa⁻³,   Q = 60 kJ/mol below -10 °C, 115 above
//
// in Pa and s. The source's A is for the effective shear stress; 2/9 makes it uniaxial. T is the pressure-adjusted
// temperature: add 7e-8 K for each Pa of pressure.
func IceCuffeyPaterson() Set {
	norton := known(creeplaw.NewNorton(fromGlen(3.5e-25, 3), 3))
	return Set{
		Record: Record{
			Name:     "glacier ice, Glen's law, Cuffey and Paterson",
			Citation: "K. M. Cuffey, W. S. B. Paterson, The Physics of Glaciers, 4th ed., Elsevier 2010, table 3.4 and eq. 3.35",
			Status:   FromMemoryHigh,
			Units:    pascalSecond,
			Range:    iceRange(),
			Caution: generalCaution + "Fabric, water, impurities and grain size change the rate several-fold. T is the " +
				"pressure-adjusted temperature. Steady creep of isotropic ice only.",
		},
		Law: known(creeplaw.WithTemperature(norton, known(creeplaw.NewTwoArrheniusAt(60e3, 115e3, 263.15)))),
	}
}

// IcePatersonBudd is Glen's flow law for glacier ice with the older coefficients of Paterson and Budd,
//
//	ṗ = (2/9) A₀ exp(-Q/RT) σ³,   A₀ = 3.985e-13, Q = 60 kJ/mol up to 263.15 K;  A₀ = 1.916e3, Q = 139 kJ/mol above
//
// in Pa and s. The branches miss each other at 263.15 K by 0.2 %, as printed. T is the pressure-adjusted temperature.
func IcePatersonBudd() Set {
	factor := known(creeplaw.NewTwoArrhenius(
		creeplaw.ArrheniusBranch{Prefactor: fromGlen(3.985e-13, 3), ActivationEnergy: 60e3},
		creeplaw.ArrheniusBranch{Prefactor: fromGlen(1.916e3, 3), ActivationEnergy: 139e3}, 263.15))
	return Set{
		Record: Record{
			Name: "glacier ice, Glen's law, Paterson and Budd",
			Citation: "W. S. B. Paterson, W. F. Budd, Cold Reg. Sci. Technol. 6 (1982) 175–177; W. S. B. Paterson, The Physics " +
				"of Glaciers, 3rd ed., Pergamon 1994",
			Status: FromMemoryHigh,
			Units:  pascalSecond,
			Range:  iceRange(),
			Caution: generalCaution + "Faster by a factor of about 1.4 at -10 °C than the fourth edition of the same book. T is " +
				"the pressure-adjusted temperature. The rate jumps by 0.2 % at 263.15 K.",
		},
		Law: known(creeplaw.WithTemperature(known(creeplaw.NewNorton(1, 3)), factor)),
	}
}

// IceGoldsbyKohlstedt is the sum of dislocation creep and grain-boundary sliding of ice after Goldsby and Kohlstedt,
//
//	ṗ = A σ⁴ exp(-Q/RT) + A_g σ^1.8 d^-1.4 exp(-Q_g/RT)
//
// in MPa and s, with A = 4e5 and Q = 60 kJ/mol below 258 K, 6e28 and 180 above; A_g = 3.9e-3 and Q_g = 49 below 255 K, 3e26
// and 192 above. The grain size d is in m, positive and finite. The basal-slip term in sequence with sliding, and diffusion,
// are left out.
func IceGoldsbyKohlstedt(grainSize float64) (Set, error) {
	dislocation := known(creeplaw.WithTemperature(known(creeplaw.NewNorton(1, 4)), known(creeplaw.NewTwoArrhenius(
		creeplaw.ArrheniusBranch{Prefactor: 4e5, ActivationEnergy: 60e3},
		creeplaw.ArrheniusBranch{Prefactor: 6e28, ActivationEnergy: 180e3}, 258))))
	if err := checkGrainSize("ice after Goldsby and Kohlstedt", grainSize); err != nil {
		return Set{}, err
	}
	boundary, err := creeplaw.NewNorton(math.Pow(grainSize, -1.4), 1.8)
	if err != nil {
		return Set{}, err
	}
	sliding := known(creeplaw.WithTemperature(boundary, known(creeplaw.NewTwoArrhenius(
		creeplaw.ArrheniusBranch{Prefactor: 3.9e-3, ActivationEnergy: 49e3},
		creeplaw.ArrheniusBranch{Prefactor: 3e26, ActivationEnergy: 192e3}, 255))))
	return Set{
		Record: Record{
			Name:     "ice, dislocation creep and grain-boundary sliding, Goldsby and Kohlstedt, " + sizeText(grainSize),
			Citation: "D. L. Goldsby, D. L. Kohlstedt, J. Geophys. Res. 106 (B6) (2001) 11017",
			Status:   FromMemoryHighMedium,
			Units:    megapascalSecond,
			Range: Range{Temperature: Interval{High: 273.15},
				Basis: "the melting point; the range of the tests is not on record here"},
			Caution: generalCaution + "Without the basal-slip and diffusion terms of the source. The printed branches miss each other: " +
				"the rate falls by up to a factor of two across 255 K and 1.3 across 258 K as the temperature rises.",
		},
		Law: known(creeplaw.NewSum(dislocation, sliding)),
	}, nil
}

func iceSets() []Set {
	return []Set{IceCuffeyPaterson(), IcePatersonBudd(), known(IceGoldsbyKohlstedt(1e-3))}
}
