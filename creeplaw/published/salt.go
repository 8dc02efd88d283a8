package published

import "example.com/holdtime/creeplaw"

// joulePerCalorie turns an activation energy in cal/mol, written for R = 1.987 cal/(mol K), into one in J/mol for the gas
// constant of this library, so that Q/R is that of the source. (The calorie of 4.184 J would make the rates 0.2 % larger.)
const joulePerCalorie = creeplaw.GasConstant / 1.987

// laboratoryOnly is what rock mechanics found when salt was tested at low stress.
const laboratoryOnly = "Tests at 0.2–0.6 MPa gave rates 7–8 orders of magnitude above the extrapolation from 5–20 MPa " +
	"(Altaussee mine, abstract read): do not extrapolate to low stress. "

// wippRange is that of the test programme on the same salt.
func wippRange() Range {
	return Range{Stress: Interval{3.5e6, 21.0e6}, Temperature: Interval{298.15, 373.15},
		Basis: "15 triaxial tests on WIPP salt for Sandia, stress difference 3.5–21.0 MPa, 25 or 100 °C (abstract read); the " +
			"range of the fit itself is not on record here"}
}

// SaltBGRa is the steady creep of rock salt after the German Federal Institute for Geosciences, in MPa and days,
//
//	ṗ = 0.18 exp(-Q/RT) σ⁵,   Q = 54 kJ/mol
func SaltBGRa() Set {
	return Set{
		Record: Record{
			Name:     "rock salt, BGRa",
			Citation: "U. Hunsche, O. Schulze, Kali und Steinsalz 11 (1994) 238–255",
			Status:   FromMemoryHigh,
			Units:    megapascalDay,
			Range: Range{Stress: Interval{5, 20},
				Basis: "the usual laboratory range of rock salt (abstract on the Altaussee tests, read); the range of the fit " +
					"itself is not on record here"},
			Caution: generalCaution + laboratoryOnly + "Salts differ by orders of magnitude between sites.",
		},
		Law: powerLaw(0.18, 5, 54e3),
	}
}

// SaltWIPP is the steady part of the reference law of the Waste Isolation Pilot Plant, in Pa and s,
//
//	ṗ = 5.79e-36 σ^4.9 exp(-Q/RT),   Q = 12 kcal/mol with R = 1.987 cal/(mol K)
func SaltWIPP() Set {
	return Set{
		Record: Record{
			Name: "rock salt, WIPP reference law, steady part",
			Citation: "W. Herrmann, W. R. Wawersik, H. S. Lauson, SAND80-0087 and SAND80-0558, 1980; R. D. Krieg, SAND83-1908, " +
				"1984",
			Status:  FromMemoryHigh,
			Units:   pascalSecond,
			Range:   wippRange(),
			Caution: generalCaution + laboratoryOnly + "Without the transient, which this law adds in its source.",
		},
		Law: powerLaw(5.79e-36, 4.9, 12e3*joulePerCalorie),
	}
}

// SaltMunsonDawson is the steady part of the law of Munson and Dawson for clean WIPP salt, in MPa and s,
//
//	ṗ = Σ Aᵢ exp(-Qᵢ/RT) (σ/μ)^nᵢ + H(σ-σ₀) [B₁ exp(-Q₁/RT) + B₂ exp(-Q₂/RT)] sinh[q(σ-σ₀)/μ]
//
// with μ = 12.4 GPa, σ₀ = 20.57 MPa and Q for R = 1.987 cal/(mol K); H is zero below σ₀ and one above. The source measures
// stress after Tresca; here it is von Mises', the same in the triaxial tests it was fitted to.
func SaltMunsonDawson() Set {
	const (
		mu     = 12.4e3 // [MPa]
		q1, q2 = 25e3 * joulePerCalorie, 10e3 * joulePerCalorie
		limit  = 20.57 // [MPa]
		q      = 5335
	)
	climb := arrhenius(known(creeplaw.NewNortonAt(8.386e22, mu, 5.5)), q1)
	unknown := arrhenius(known(creeplaw.NewNortonAt(9.672e12, mu, 5.0)), q2)
	glide := func(b, activation float64) creeplaw.Law {
		sinh := known(creeplaw.NewGarofalo(b, q/mu, 1))
		return arrhenius(known(creeplaw.WithThreshold(sinh, limit)), activation)
	}
	return Set{
		Record: Record{
			Name: "rock salt, Munson and Dawson, clean WIPP salt, steady part",
			Citation: "D. E. Munson, A. F. Fossum, P. E. Senseny, SAND88-2948, 1989; D. E. Munson, Int. J. Rock Mech. Min. Sci. " +
				"34 (1997) 233–247",
			Status: FromMemoryHigh,
			Units:  megapascalSecond,
			Range:  Range{Stress: Interval{3.5, 21.0}, Temperature: wippRange().Temperature, Basis: wippRange().Basis},
			Caution: generalCaution + laboratoryOnly + "Without the transient. Written for the Tresca stress in its source. The " +
				"slope jumps at 20.57 MPa.",
		},
		Law: known(creeplaw.NewSum(climb, unknown, glide(6.086e6, q1), glide(3.034e-2, q2))),
	}
}

// carterRange is from memory.
func carterRange() Range {
	return Range{Stress: Interval{2.5, 20.7}, Temperature: Interval{323.15, 473.15},
		Basis: "from memory, confidence low: 2.5–20.7 MPa, 50–200 °C for both fits together"}
}

const carterCitation = "N. L. Carter, S. T. Horseman, J. E. Russell, J. Handin, J. Struct. Geol. 15 (1993) 1257–1271"

// SaltCarterLowStress is the fit of Carter and others to the lower stresses, in MPa and s,
//
//	ṗ = 8.1e-5 σ^3.4 exp(-Q/RT),   Q = 51.6 kJ/mol
//
// How it joins SaltCarterHighStress is not on record here, so they are not combined.
func SaltCarterLowStress() Set {
	return Set{
		Record: Record{
			Name: "rock salt, Carter and others, low stress", Citation: carterCitation, Status: FromMemoryHighMedium,
			Units: megapascalSecond, Range: carterRange(),
			Caution: generalCaution + laboratoryOnly + "One of two fits; where one takes over from the other is not on record here.",
		},
		Law: powerLaw(8.1e-5, 3.4, 51.6e3),
	}
}

// SaltCarterHighStress is the fit of Carter and others to the higher stresses, in MPa and s,
//
//	ṗ = 1.6e-4 σ^5.3 exp(-Q/RT),   Q = 68.1 kJ/mol
func SaltCarterHighStress() Set {
	return Set{
		Record: Record{
			Name: "rock salt, Carter and others, high stress", Citation: carterCitation, Status: FromMemoryHighMedium,
			Units: megapascalSecond, Range: carterRange(),
			Caution: generalCaution + laboratoryOnly + "One of two fits; where one takes over from the other is not on record here.",
		},
		Law: powerLaw(1.6e-4, 5.3, 68.1e3),
	}
}

func saltSets() []Set {
	return []Set{SaltBGRa(), SaltWIPP(), SaltMunsonDawson(), SaltCarterLowStress(), SaltCarterHighStress()}
}
