package published

import (
	"example.com/holdtime/creeplaw"
)

// Metal is one column of the tables of Frost and Ashby, in SI units: what their laws of dislocation creep and diffusional
// flow need. The constructors below fill it; a changed copy makes a set of its own.
type Metal struct {
	Name               string
	Status             Status
	AtomicVolume       float64              // Ω [m³]
	BurgersVector      float64              // b [m]
	MeltingPoint       float64              // Tm [K]
	PhaseChange        float64              // above which this phase is gone [K]; zero if it lasts to the melting point
	ShearModulus       float64              // μ₀ at 300 K [Pa]
	ModulusCoefficient float64              // (Tm/μ₀) dμ/dT [-]
	Lattice            creeplaw.Diffusivity // D₀v [m²/s], Qv
	Boundary           creeplaw.Diffusivity // δD₀b [m³/s], Qb
	Core               creeplaw.Diffusivity // a_c D₀c [m⁴/s], Qc; zero where the table has none
	StressExponent     float64              // n [-]
	Prefactor          float64              // A, for tension [-]
	Caution            string               // besides the general one
}

const frostAshby = "H. J. Frost, M. F. Ashby, Deformation-Mechanism Maps, Pergamon 1982, tables 4.1, 5.1, 8.1"

// Modulus is μ(T) = μ₀ [1 + (T - 300)/Tm · (Tm/μ₀)(dμ/dT)].
func (m Metal) Modulus() creeplaw.ShearModulus {
	return creeplaw.ShearModulus{Value: m.ShearModulus, Reference: 300,
		Slope: m.ModulusCoefficient * m.ShearModulus / m.MeltingPoint}
}

// PowerLaw is dislocation creep, in tension and in Pa and s,
//
//	ṗ = A (D μ b/kT) (σ/μ)ⁿ,   D = D_v [1 + (10 a_c D_c/(b² D_v)) (σ/√3μ)²]
//
// A Metal changed to something impossible gives the *creeplaw.ParameterError of creeplaw.NewMukherjeeBirdDorn.
func (m Metal) PowerLaw() (Set, error) {
	law, err := creeplaw.NewMukherjeeBirdDorn(creeplaw.DislocationCreep{
		Prefactor:      m.Prefactor,
		StressExponent: m.StressExponent,
		Modulus:        m.Modulus(),
		Lattice:        m.Lattice,
		BurgersVector:  m.BurgersVector,
		Core:           m.Core,
	})
	if err != nil {
		return Set{}, err
	}
	return Set{Record: m.record("power-law creep", 1e-3*m.ShearModulus,
		"power-law creep as common practice bounds it: above 0.4 Tm, stresses to 1e-3 of the modulus at 300 K"), Law: law}, nil
}

// Diffusional is diffusional flow, in tension and in Pa and s, for a grain size d [m], positive and finite,
//
//	ṗ = 14 (σΩ/kT d²) D_v [1 + π δD_b/(d D_v)]
func (m Metal) Diffusional(grainSize float64) (Set, error) {
	law, err := creeplaw.NewDiffusional(m.AtomicVolume, grainSize, m.Lattice, m.Boundary)
	if err != nil {
		return Set{}, err
	}
	return Set{Record: m.record("diffusional flow, "+sizeText(grainSize), 1e-4*m.ShearModulus,
		"diffusional flow as common practice bounds it: above 0.4 Tm, stresses to 1e-4 of the modulus at 300 K, above which "+
			"dislocations rule"), Law: law}, nil
}

func (m Metal) record(mechanism string, highestStress float64, basis string) Record {
	highest := m.MeltingPoint
	if m.PhaseChange != 0 {
		highest = m.PhaseChange
	}
	return Record{
		Name:     m.Name + ", " + mechanism + ", Frost and Ashby",
		Citation: frostAshby,
		Status:   m.Status,
		Units:    pascalSecond,
		Range: Range{Stress: Interval{0, highestStress}, Temperature: Interval{0.4 * m.MeltingPoint, highest},
			Basis: basis},
		Caution: generalCaution + "Maps are good to a factor of a few at best, for the pure or solution-annealed metal. " + m.Caution,
	}
}

// Nickel is pure nickel.
func Nickel() Metal {
	return Metal{Name: "nickel", Status: FromMemoryHigh, AtomicVolume: 1.09e-29, BurgersVector: 2.49e-10, MeltingPoint: 1726,
		ShearModulus: 78.9e9, ModulusCoefficient: -0.64, Lattice: path(1.9e-4, 284e3), Boundary: path(3.5e-15, 115e3),
		Core: path(3.1e-23, 170e3), StressExponent: 4.6, Prefactor: 3.0e6}
}

// Copper is pure copper.
func Copper() Metal {
	return Metal{Name: "copper", Status: FromMemoryHigh, AtomicVolume: 1.18e-29, BurgersVector: 2.56e-10, MeltingPoint: 1356,
		ShearModulus: 42.1e9, ModulusCoefficient: -0.54, Lattice: path(2.0e-5, 197e3), Boundary: path(5.0e-15, 104e3),
		Core: path(1.0e-24, 117e3), StressExponent: 4.8, Prefactor: 7.4e5}
}

// Aluminium is pure aluminium.
func Aluminium() Metal {
	return Metal{Name: "aluminium", Status: FromMemoryHigh, AtomicVolume: 1.66e-29, BurgersVector: 2.86e-10, MeltingPoint: 933,
		ShearModulus: 25.4e9, ModulusCoefficient: -0.50, Lattice: path(1.7e-4, 142e3), Boundary: path(5.0e-14, 84e3),
		Core: path(7.0e-25, 82e3), StressExponent: 4.4, Prefactor: 3.4e6}
}

// Lead is pure lead.
func Lead() Metal {
	return Metal{Name: "lead", Status: FromMemoryMedium, AtomicVolume: 3.03e-29, BurgersVector: 3.49e-10, MeltingPoint: 601,
		ShearModulus: 7.3e9, ModulusCoefficient: -0.76, Lattice: path(1.4e-4, 109e3), Boundary: path(8.0e-14, 66e3),
		StressExponent: 5.0, Prefactor: 2.5e8,
		Caution: "Core diffusion is left out: its prefactor is not on record here, and at room temperature it counts."}
}

// AlphaIron is pure iron below 1184 K. It stands in for the low-alloy steel of the source, whose prefactor is not on record
// here: alloying makes such steels creep slower by orders of magnitude.
func AlphaIron() Metal {
	return Metal{Name: "α-iron", Status: FromMemoryMedium, AtomicVolume: 1.18e-29, BurgersVector: 2.48e-10, MeltingPoint: 1810,
		PhaseChange:  1184,
		ShearModulus: 64e9, ModulusCoefficient: -0.81, Lattice: path(2.0e-4, 251e3), Boundary: path(1.1e-12, 174e3),
		Core: path(1.0e-23, 174e3), StressExponent: 6.9, Prefactor: 7.0e13,
		Caution: "Pure iron, below the change to γ at 1184 K; near the Curie point at 1043 K modulus and diffusion depart " +
			"from these formulas."}
}

// Steel304 is austenitic stainless steel, type 304.
func Steel304() Metal {
	m := austenitic()
	m.Name, m.StressExponent, m.Prefactor = "304 stainless steel", 7.5, 1.5e12
	m.Caution = "The rate looks fast for this steel (1.8e-3 /h at 650 °C, 150 MPa): look in the source before use."
	return m
}

// Steel316 is austenitic stainless steel, type 316.
func Steel316() Metal {
	m := austenitic()
	m.Name, m.StressExponent, m.Prefactor = "316 stainless steel", 7.9, 1.0e10
	return m
}

func austenitic() Metal {
	return Metal{Status: FromMemoryMedium, AtomicVolume: 1.21e-29, BurgersVector: 2.58e-10, MeltingPoint: 1680,
		ShearModulus: 81e9, ModulusCoefficient: -0.85, Lattice: path(3.7e-5, 280e3), Boundary: path(2.0e-13, 167e3)}
}

func path(prefactor, activationEnergy float64) creeplaw.Diffusivity {
	return creeplaw.Diffusivity{Prefactor: prefactor, ActivationEnergy: activationEnergy}
}

// Metals returns every Metal of this package.
func Metals() []Metal {
	return []Metal{Nickel(), Copper(), Aluminium(), Lead(), AlphaIron(), Steel304(), Steel316()}
}

func metalSets() []Set {
	var sets []Set
	for _, m := range Metals() {
		sets = append(sets, known(m.PowerLaw()), known(m.Diffusional(50e-6)))
	}
	return sets
}
