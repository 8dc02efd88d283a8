package published

import (
	"math"

	"example.com/holdtime/creeplaw"
)

const rockCaution = "Laboratory rates, used in the earth 5–10 orders of magnitude slower. Without the effect of pressure: " +
	"the activation volume is left out."

// OlivineHirthKohlstedt is the sum of dislocation and diffusion creep of dry olivine after Hirth and Kohlstedt, in MPa and s,
//
//	ṗ = 1.1e5 σ^3.5 exp(-530 kJ/mol/RT) + 1.5e9 σ d⁻³ exp(-375 kJ/mol/RT),   d in µm
//
// at low pressure. The grain size is given here in m, positive and finite.
func OlivineHirthKohlstedt(grainSize float64) (Set, error) {
	if err := checkGrainSize("olivine after Hirth and Kohlstedt", grainSize); err != nil {
		return Set{}, err
	}
	diffusion, err := creeplaw.NewNorton(1.5e9*math.Pow(grainSize*1e6, -3), 1)
	if err != nil {
		return Set{}, err
	}
	return Set{
		Record: Record{
			Name: "dry olivine, dislocation and diffusion creep, Hirth and Kohlstedt, " + sizeText(grainSize),
			Citation: "G. Hirth, D. L. Kohlstedt, in Inside the Subduction Factory, Geophys. Monogr. 138, AGU 2003, 83–105 " +
				"(bibliography from memory)",
			Status:  FromMemoryHigh,
			Units:   megapascalSecond,
			Range:   Range{Basis: "not on record here"},
			Caution: generalCaution + rockCaution + " Dry only.",
		},
		Law: known(creeplaw.NewSum(powerLaw(1.1e5, 3.5, 530e3), arrhenius(diffusion, 375e3))),
	}, nil
}

// QuartziteGleasonTullis is the dislocation creep of quartzite after Gleason and Tullis, in MPa and s,
//
//	ṗ = 1.1e-4 σ⁴ exp(-223 kJ/mol/RT)
func QuartziteGleasonTullis() Set {
	return Set{
		Record: Record{
			Name:     "quartzite, Gleason and Tullis",
			Citation: "G. C. Gleason, J. Tullis, Tectonophysics 247 (1995) 1–23 (bibliography from memory)",
			Status:   FromMemoryHighMedium,
			Units:    megapascalSecond,
			Range:    Range{Basis: "not on record here"},
			Caution:  generalCaution + rockCaution + " The water content is that of the tests.",
		},
		Law: powerLaw(1.1e-4, 4, 223e3),
	}
}

func rockSets() []Set {
	return []Set{known(OlivineHirthKohlstedt(1e-3)), QuartziteGleasonTullis()}
}
