package main

import (
	"math"

	"example.com/holdtime/bench"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// The material in MPa and h; invented, of the size of a steel at temperature.
const (
	young, poisson = 160e3, 0.3
	shear          = young / (2 * (1 + poisson))
	warmth         = 823
)

// problem is a strain history of one material point from virgin material whose end is known in closed form. The strain is a
// multiple of one deviator, so the bar problems of package bench apply with 3G for Young's modulus.
type problem struct {
	name     string
	law      creeplaw.Law
	from, to tensor.Sym // strain, linear over the time
	hours    float64
	exact    float64 // von Mises stress at the end [MPa]
	scale    float64 // largest stress on the way [MPa]
}

// along is a deviatoric strain in a general direction whose elastic von Mises stress is mises.
func along(mises float64) tensor.Sym {
	e := tensor.Sym{1, -0.4, -0.6, 0.3, -0.2, 0.5}
	return e.Scale(mises / (3 * shear) / e.EquivalentStrain())
}

func problems() ([]problem, error) {
	const start, hours = 200.0, 1000.0
	hold := func(name string, law creeplaw.Law, exact float64) problem {
		return problem{name, law, along(start), along(start), hours, exact, start}
	}
	norton, err := creeplaw.NewNortonAt(3.2e-5, 200, 5)
	if err != nil {
		return nil, err
	}
	steep, err := creeplaw.NewNortonAt(1e-3, 200, 25)
	if err != nil {
		return nil, err
	}
	sinh, err := creeplaw.NewGarofalo(1e-9, 0.05, 1)
	if err != nil {
		return nil, err
	}
	primary, err := creeplaw.NewBaileyNortonAt(3e-4, 200, 1, 5, 0.4)
	if err != nil {
		return nil, err
	}
	// The path of closed forms: relaxation (Norton 1929; Odqvist & Hult 1962), sinh (after Nadai 1938), strain hardening
	// (Finnie & Heller 1959), constant rate from zero stress.
	decay := func(rate, n float64) float64 { // σ^(1-n) = σ₀^(1-n) + 3(n-1) G A t, in units of σ₀
		return start * math.Pow(1+(n-1)*3*shear*rate/start*hours, -1/(n-1))
	}
	pull := bench.ConstantRateTension{Young: 3 * shear, StrainRate: 2e-5, Law: bench.Norton{Rate: 3.2e-5, Stress: 200, Exponent: 5}}
	pulled := along(1)
	pulled = pulled.Scale(2e-5 * 60 / pulled.EquivalentStrain())
	return []problem{
		hold("Norton, n = 5", norton, decay(3.2e-5, 5)),
		hold("Norton, n = 25", steep, decay(1e-3, 25)),
		hold("sinh", sinh, bench.SinhRelaxation{Young: 3 * shear, Stress: start, Prefactor: 1e-9, Coefficient: 0.05}.StressAt(hours)),
		hold("strain hardening", primary, bench.StrainHardeningRelaxation{Young: 3 * shear, Stress: start,
			Curve: bench.BaileyNorton{Strain: 3e-4, Stress: 200, Time: 1, StressExponent: 5, TimeExponent: 0.4}}.StressAt(hours)),
		{"constant rate", norton, tensor.Sym{}, pulled, 60, pull.StressAt(60), pull.StressAt(60)},
	}, nil
}

func (p *problem) material() (*integrate.Material, error) {
	return integrate.New(integrate.NewIsotropic(young, poisson), p.law, integrate.Options{})
}

// follow takes the problem with an error-controlled walk.
func (p *problem) follow(m *integrate.Material, relative float64) (mises float64, solves int, err error) {
	var stress tensor.Sym
	var state integrate.State
	c, err := m.FollowStress(&stress, &state, &state, integrate.Conditions{Strain: p.from, Temperature: warmth},
		integrate.Increment{Dt: p.hours, Strain: p.to, Temperature: warmth},
		integrate.Tolerance{Relative: relative, Stress: p.scale}, 0)
	return stress.Mises(), c.Solves, err
}

// steps takes the problem with equal backward-Euler steps, as a host does that knows nothing of errors.
func (p *problem) steps(m *integrate.Material, count int) (mises float64, err error) {
	var stress tensor.Sym
	var state integrate.State
	for k := 1; k <= count; k++ {
		part := float64(k) / float64(count)
		inc := integrate.Increment{Dt: p.hours / float64(count), Strain: p.from.Add(p.to.Sub(p.from).Scale(part)), Temperature: warmth}
		if err := m.Stress(&stress, &state, &state, inc); err != nil {
			return 0, err
		}
	}
	return stress.Mises(), nil
}
