package main

import (
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
	"example.com/holdtime/creeplaw/curve"
)

// specimen is a law with parameters, on its way through the audit.
type specimen struct {
	family family
	name   string
	built
}

// family is what shares a pair of panels.
type family string

// patience is how much longer a creep curve must be to show what its family is for: rupture.
func (s specimen) patience() float64 {
	if s.family == tertiary || s.family == damage {
		return 2
	}
	return 1
}

// built is what a constructor gave: a law, or a rate that depends on a clock, or an error.
type built struct {
	law     creeplaw.Law
	clocked creeplaw.Clocked
	err     error
}

// conditions are where a specimen is audited and drawn.
type conditions struct {
	domain      audit.Domain
	stress      float64 // [MPa]
	temperature float64 // [K]
	horizon     float64 // of the creep curve [h]
}

// The invented steel: every law of it has about one per cent of creep strain after 10 000 h at 100 MPa and 600 °C, the steady
// ones at 1e-6 1/h, and where nothing else is said an activation energy of 300 kJ/mol. They part at any other stress.
const (
	commonStress      = 100.0  // [MPa]
	commonTemperature = 873.15 // [K]
	commonRate        = 1e-6   // [1/h]
	commonStrain      = 0.01
	commonTime        = 1e4 // [h]
	activationEnergy  = 300e3
)

var units = creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}

func arrhenius() creeplaw.Arrhenius {
	f, err := creeplaw.NewArrheniusAt(activationEnergy, commonTemperature)
	if err != nil {
		panic(err) // constants above
	}
	return f
}

// plain takes a law as it comes from its constructor.
func plain[L creeplaw.Law](law L, err error) built { return built{law: law, err: err} }

// hot multiplies the rate of a law by the steel's Arrhenius factor.
func hot[L creeplaw.Law](law L, err error) built {
	if err != nil {
		return built{err: err}
	}
	return plain(creeplaw.WithTemperature(law, arrhenius()))
}

// matched takes a law in Pa and s, changes its units to MPa and h, and its rate to the steel's: as if its unit of time were
// another, which is a factor on the rate.
func matched[L creeplaw.Law](law L, err error) built {
	if err != nil {
		return built{err: err}
	}
	own := creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second}
	converted, err := creeplaw.InUnits(law, own, units)
	if err != nil {
		return built{err: err}
	}
	rate := converted.Rate(creeplaw.Point{Stress: commonStress, Temperature: commonTemperature}).Value
	own.Time *= creeplaw.TimeUnit(rate / commonRate)
	return plain(creeplaw.InUnits(law, own, units))
}

// hardened makes a strain-hardening law of a curve and multiplies its rate by the steel's Arrhenius factor.
func hardened[C curve.Curve](c C, err error) built {
	if err != nil {
		return built{err: err}
	}
	return hot(curve.NewStrainHardened(c))
}

// hardenedAsItIs is for a curve with a temperature of its own.
func hardenedAsItIs[C curve.Curve](c C, err error) built {
	if err != nil {
		return built{err: err}
	}
	return plain(curve.NewStrainHardened(c))
}

// clocked takes the rate of a curve from a clock: time hardening.
func clocked[C curve.Curve](c C, err error) built {
	if err != nil {
		return built{err: err}
	}
	h, err := curve.NewTimeHardened(c)
	return built{clocked: h, err: err}
}
