package main

import (
	"math"

	"example.com/holdtime/integrate"
)

// joint is a flange joint: equal bolts, each a chain of sections, that clamp an elastic flange and gasket. The sections are
// material points of the library under uniaxial stress; everything else is a spring. Units: N, mm, MPa, h, K.
//
// With the nut's position u (how far tightening has shortened the free bolt), the bolt strains εᵢ over the lengths Lᵢ, the
// free thermal strain εf of the flange and the bolt load F,
//
//	Σ Lᵢ εᵢ + F (1/kf + 1/kg) = u + L εf,   L = Σ Lᵢ
//
// so creep of the bolts is fed by the spring-back of flange and gasket: elastic follow-up.
type joint struct {
	title    string
	count    int     // bolts
	pitch    float64 // of the thread [mm]
	sections []section
	bolt     *integrate.Material
	young    integrate.Table // of the bolts [MPa], for the stiffness that is printed
	poisson  integrate.Table
	growth   integrate.Expansion // of the bolts
	flange   flange
	preload  float64 // clamp load of the whole joint after tightening [N]
	required float64 // clamp load the gasket needs [N]
}

// section is a length of the bolt with one cross-section.
type section struct {
	name   string
	length float64 // [mm]
	area   float64 // [mm²]
}

// flange is what the bolts clamp.
type flange struct {
	stiffness integrate.Table // kf, per bolt [N/mm]
	gasket    float64         // kg, per bolt [N/mm]; +Inf without a gasket
	growth    integrate.Expansion
}

// length is the clamped length L.
func (j *joint) length() float64 {
	sum := 0.0
	for _, s := range j.sections {
		sum += s.length
	}
	return sum
}

// perBolt shares a load of the joint among its bolts.
func (j *joint) perBolt(load float64) float64 { return load / float64(j.count) }

// compliance of flange and gasket per bolt [mm/N] and its derivative by temperature.
func (f *flange) compliance(temperature float64) (value, slope float64) {
	k, byT := f.stiffness.At(temperature)
	return 1/k + 1/f.gasket, -byT / (k * k)
}

// boltCompliance is Σ Lᵢ/(E Aᵢ) [mm/N].
func (j *joint) boltCompliance(temperature float64) float64 {
	young, _ := j.young.At(temperature)
	sum := 0.0
	for _, s := range j.sections {
		sum += s.length / (young * s.area)
	}
	return sum
}

// followUp is Z = 1 + k_bolt/k_joint: 1 for a rigid flange, large for a soft one.
func (j *joint) followUp(boltTemperature, flangeTemperature float64) float64 {
	c, _ := j.flange.compliance(flangeTemperature)
	return 1 + c/j.boltCompliance(boltTemperature)
}

// thinnest is the index of the section with the highest stress.
func (j *joint) thinnest() int {
	at := 0
	for i, s := range j.sections {
		if s.area < j.sections[at].area {
			at = i
		}
	}
	return at
}

// freeStrain is the thermal strain α (T-T₀) and its derivative by temperature.
func freeStrain(x *integrate.Expansion, temperature float64) (value, slope float64) {
	alpha, byT := x.Mean.At(temperature)
	dT := temperature - x.Reference
	return alpha * dT, alpha + byT*dT
}

// untabulated names the property that is not given at the temperatures, or is empty.
func (j *joint) untabulated(bolt, flange float64) (ofBolt, ofFlange string) {
	at := func(t integrate.Table, temperature float64) bool {
		v, _ := t.At(temperature)
		return math.IsNaN(v)
	}
	switch {
	case at(j.young, bolt):
		ofBolt = "bolts.young_MPa"
	case at(j.poisson, bolt):
		ofBolt = "bolts.poisson"
	case at(j.growth.Mean, bolt):
		ofBolt = "bolts.expansion_per_K"
	}
	switch {
	case at(j.flange.stiffness, flange):
		ofFlange = "flange.stiffness_per_bolt_kN_per_mm"
	case at(j.flange.growth.Mean, flange):
		ofFlange = "flange.expansion_per_K"
	}
	return ofBolt, ofFlange
}

// largestElasticStrain is the elastic strain beyond which a bolt load is taken for a mistake of units: bolts yield at a
// tenth of it, and the library's small strains end near it.
const largestElasticStrain = 0.02

// overstressed returns the stress and the name of the first section in which a clamp load passes that strain.
func (j *joint) overstressed(load, temperature float64) (stress float64, name string, over bool) {
	young, _ := j.young.At(temperature)
	s := j.sections[j.thinnest()]
	stress = j.perBolt(load) / s.area
	return stress, s.name, !(stress <= largestElasticStrain*young)
}
