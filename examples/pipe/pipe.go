package main

import (
	"math"

	"example.com/holdtime/bench"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
)

// pipe is a thick-walled pipe with closed ends under internal pressure. MPa, mm, h, K.
type pipe struct {
	title                   string
	inner, outer            float64 // radii
	pressure                float64
	boreKelvin, outerKelvin float64 // steady temperatures of the two surfaces
	young, poisson          float64
	expansion               float64 // from the temperature of the outside; with closed ends only differences count
	rate, stress, atKelvin  float64 // creep rate under a stress at a temperature,
	exponent                float64 // rising with this power of stress
	activation              float64 // and with this activation energy [J/mol]
}

const icePoint = 273.15 // 0 °C in kelvin

// readPipe reads a pipe file.
func readPipe(file string, text []byte) (*pipe, error) {
	r := readRecord(file, text)
	const most = 1e6
	celsius := func(name string) float64 { return r.number(name, -200, false, 2500) + icePoint }
	p := &pipe{
		title:       r.title("title"),
		inner:       r.number("inner_radius_mm", 0, false, most),
		outer:       r.number("outer_radius_mm", 0, false, most),
		pressure:    r.number("pressure_MPa", 0, false, most),
		boreKelvin:  celsius("bore_temperature_C"),
		outerKelvin: celsius("outside_temperature_C"),
		young:       r.number("young_MPa", 0, false, 1e7),
		poisson:     r.number("poisson", 0, true, 0.49),
		expansion:   r.number("expansion_per_K", 0, true, 1e-3),
		rate:        r.number("creep_rate_per_h", 0, false, most),
		stress:      r.number("at_stress_MPa", 0, false, most),
		atKelvin:    celsius("at_temperature_C"),
		exponent:    r.number("stress_exponent", 1, true, 12),
		activation:  r.number("activation_energy_J_per_mol", 0, true, 1e6),
	}
	if ratio := p.outer / p.inner; r.err == nil && !(ratio >= 1.05 && ratio <= 10) {
		r.fault(r.take("outer_radius_mm").Offset, "outer_radius_mm is %v, must be 1.05 to 10 times inner_radius_mm, %v", p.outer, p.inner)
	}
	return p, r.done()
}

// uniform is the same pipe at the mean of its two temperatures.
func (p *pipe) uniform() *pipe {
	q := *p
	q.boreKelvin = (p.boreKelvin + p.outerKelvin) / 2
	q.outerKelvin = q.boreKelvin
	return &q
}

// kelvinAt is the temperature of steady conduction through the wall, linear in ln r.
func (p *pipe) kelvinAt(radius float64) float64 {
	return p.boreKelvin + (p.outerKelvin-p.boreKelvin)*math.Log(radius/p.inner)/math.Log(p.outer/p.inner)
}

// material is what the library gets: Norton creep with an Arrhenius factor.
func (p *pipe) material() (*integrate.Material, error) {
	norton, err := creeplaw.NewNortonAt(p.rate, p.stress, p.exponent)
	if err != nil {
		return nil, err
	}
	arrhenius, err := creeplaw.NewArrheniusAt(p.activation, p.atKelvin)
	if err != nil {
		return nil, err
	}
	law, err := creeplaw.WithTemperature(norton, arrhenius)
	if err != nil {
		return nil, err
	}
	return integrate.New(integrate.NewIsotropic(p.young, p.poisson), law, integrate.Options{
		Expansion: integrate.Expansion{Mean: integrate.Constant(p.expansion), Reference: p.outerKelvin}})
}

// nortonAt is the same law at one temperature, for the closed forms; nothing of the library's law is in it.
func (p *pipe) nortonAt(kelvin float64) bench.Norton {
	return bench.Norton{Rate: p.rate * p.activated(kelvin), Stress: p.stress, Exponent: p.exponent}
}

// activated is exp[-(Q/R)(1/T - 1/T₀)].
func (p *pipe) activated(kelvin float64) float64 {
	const gas = 8.314462618 // J/(mol K), CODATA 2018
	return math.Exp(-p.activation / gas * (1/kelvin - 1/p.atKelvin))
}
