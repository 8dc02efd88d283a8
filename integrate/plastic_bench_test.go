package integrate_test

import (
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
)

// BenchmarkPlasticity measures the step of a material with plasticity against the step without on the same points (xstep): once
// with a yield stress above all of them, once with one that two thirds of the trial stresses exceed.
//
//	go test ./integrate -run '^$' -bench Plasticity
func BenchmarkPlasticity(b *testing.B) {
	norton, _ := creeplaw.NewNortonAt(1e-6, 100, 5)
	primary, _ := creeplaw.NewBaileyNortonAt(1e-3, 100, 100, 5, 0.4)
	constant := integrate.Constant
	for _, c := range []struct {
		name  string
		law   creeplaw.Law
		curve integrate.Hardening
	}{
		{"Norton/elastic", norton, integrate.LinearHardening{Yield: constant(1e4)}},
		{"Norton/perfect", norton, integrate.LinearHardening{Yield: constant(60)}},
		{"Norton/linear", norton, integrate.LinearHardening{Yield: constant(60), Modulus: constant(4000)}},
		{"Norton/Voce", norton, integrate.VoceHardening{Yield: constant(60), Saturation: constant(40), Rate: constant(200)}},
		{"BaileyNorton/linear", primary, integrate.LinearHardening{Yield: constant(60), Modulus: constant(4000)}},
	} {
		b.Run(c.name, func(b *testing.B) {
			with, without := plastic(b, c.law, c.curve, integrate.RemembersCreep), material(b, c.law)
			var out integrate.Result
			step := func(m *integrate.Material) func(*benchPoint) {
				return func(p *benchPoint) {
					if err := m.Step(&out, &p.old, integrate.Increment{Dt: p.dt, Strain: p.strain, Temperature: 800}); err != nil {
						b.Fatal(err)
					}
				}
			}
			points := benchMix(c.law, 256)
			yielded := 0
			for i := range points {
				step(with)(&points[i])
				if out.PlasticStep > 0 {
					yielded++
				}
			}
			ratio(b, points, step(without), step(with))
			b.ReportMetric(float64(yielded)/float64(len(points)), "yielding")
		})
	}
}
