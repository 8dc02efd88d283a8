package integrate

import (
	"fmt"
	"math"
	"sort"
)

// Hardening is isotropic hardening: the yield stress σy(κ, T) as a function of the accumulated equivalent plastic strain κ
// [-] and the absolute temperature T [K]. It is LinearHardening, VoceHardening or TabulatedHardening; New refuses one that
// softens, because the step would then have several solutions and a mesh-dependent one in a structure.
type Hardening interface {
	// YieldStress returns σy [stress] and its derivatives by κ [stress] and by T [stress/K]; NaN outside a table of temperature
	// and for κ < 0.
	YieldStress(strain, temperature float64) (value, byStrain, byTemperature float64)

	check() error
	at(temperature float64) curve // NaN in yield outside a table
}

// LinearHardening is
//
//	σy = σ₀(T) + H(T) κ
//
// with the initial yield stress σ₀ [stress], positive, and the plastic modulus H [stress], >= 0: the slope of the yield stress
// over plastic strain, not the tangent modulus Eₜ of the stress over total strain, H = Eₜ E/(E - Eₜ). Without a modulus it is
// perfect plasticity.
type LinearHardening struct {
	Yield   Table // σ₀
	Modulus Table // H
}

// VoceHardening saturates,
//
//	σy = σ₀(T) + Q(T) (1 - exp(-b(T) κ)) + H(T) κ
//
// with the initial yield stress σ₀ [stress], positive, the saturation stress above it Q [stress], >= 0, the saturation rate b
// [-], >= 0, and, for a curve that keeps rising, a modulus H [stress], >= 0, zero in the published law.
//
// Source: E. Voce, The relationship between stress and strain for homogeneous deformation, J. Inst. Metals 74 (1948) 537–562
// (from memory).
type VoceHardening struct {
	Yield      Table // σ₀
	Saturation Table // Q
	Rate       Table // b
	Modulus    Table // H
}

// TabulatedHardening is a yield stress given at a number of plastic strains, each a constant or a table over temperature, and
// linear in plastic strain between them. Beyond the last strain it is perfect plasticity at the last yield stress. At a
// tabulated strain the derivative is the one towards higher strain. NewTabulatedHardening builds it; it is never changed.
type TabulatedHardening struct {
	strain          []float64 // ascending from 0
	yield           []Table
	lowest, highest float64 // temperatures at which all the tables are defined
}

// NewTabulatedHardening builds a hardening curve from at least two points: plastic strains [-] that ascend strictly from 0,
// and as many yield stresses [stress], positive and at no temperature falling from one strain to the next. Measured curves give
// stress over total strain; take σ/E off the strain first. The slices are copied. A fault is a *MaterialError.
func NewTabulatedHardening(strain []float64, yield []Table) (TabulatedHardening, error) {
	h := TabulatedHardening{strain: append([]float64(nil), strain...), yield: append([]Table(nil), yield...),
		highest: math.Inf(1)}
	for _, y := range yield {
		low, high := y.Range()
		h.lowest, h.highest = math.Max(h.lowest, low), math.Min(h.highest, high)
	}
	if err := h.check(); err != nil {
		return TabulatedHardening{}, err
	}
	return h, nil
}

// YieldStress returns σy and its derivatives; see Hardening.
func (h LinearHardening) YieldStress(strain, temperature float64) (value, byStrain, byTemperature float64) {
	c := h.at(temperature)
	return c.stress(strain)
}

// YieldStress returns σy and its derivatives; see Hardening.
func (h VoceHardening) YieldStress(strain, temperature float64) (value, byStrain, byTemperature float64) {
	c := h.at(temperature)
	return c.stress(strain)
}

// YieldStress returns σy and its derivatives; see Hardening.
func (h TabulatedHardening) YieldStress(strain, temperature float64) (value, byStrain, byTemperature float64) {
	c := h.at(temperature)
	return c.stress(strain)
}

func (h LinearHardening) check() error {
	return VoceHardening{Yield: h.Yield, Modulus: h.Modulus}.check()
}

func (h VoceHardening) check() error {
	if err := positive(h.Yield, "yield stress"); err != nil {
		return err
	}
	for _, p := range []struct {
		name  string
		table Table
	}{{"plastic modulus", h.Modulus}, {"saturation stress", h.Saturation}, {"saturation rate", h.Rate}} {
		err := p.table.each(func(temperature, v float64) error {
			if !(v >= 0) || !finite(v) {
				return &MaterialError{p.name, v, temperature, "finite and at least 0: softening has no unique solution"}
			}
			return nil
		})
		if err != nil {
			return err
		}
	}
	return nil
}

func positive(t Table, name string) error {
	return t.each(func(temperature, v float64) error {
		if !(v > 0) || !finite(v) {
			return &MaterialError{name, v, temperature, "positive and finite"}
		}
		return nil
	})
}

func (h TabulatedHardening) check() error {
	switch n := len(h.strain); {
	case n < 2:
		return &MaterialError{"number of plastic strains of the hardening table", float64(n), 0, "at least 2"}
	case n != len(h.yield):
		return &MaterialError{"number of yield stresses of the hardening table", float64(len(h.yield)), 0, "that of the strains"}
	case h.strain[0] != 0:
		return &MaterialError{"first plastic strain of the hardening table", h.strain[0], 0, "0"}
	case !(h.lowest <= h.highest):
		return &MaterialError{"lowest temperature common to the yield stresses", h.lowest, 0,
			fmt.Sprintf("at most the highest, %v K", h.highest)}
	}
	for i, k := range h.strain {
		if i > 0 && !(k > h.strain[i-1] && finite(k)) {
			return &MaterialError{fmt.Sprintf("plastic strain %d of the hardening table", i), k, 0, "finite and above the one before it"}
		}
		if err := positive(h.yield[i], fmt.Sprintf("yield stress at plastic strain %v", k)); err != nil {
			return err
		}
		if i > 0 {
			if err := h.rises(i); err != nil {
				return err
			}
		}
	}
	return nil
}

// rises reports a temperature at which the yield stress falls from the strain before to strain i. Between the temperatures of
// both tables their difference is linear, so that those temperatures are all there is to ask.
func (h *TabulatedHardening) rises(i int) error {
	before, after := h.yield[i-1], h.yield[i]
	test := func(temperature, _ float64) error {
		if temperature == 0 {
			temperature = h.lowest // of a constant: any
		}
		from, _ := before.At(temperature)
		to, _ := after.At(temperature)
		if to < from*(1-4*epsilon) { // interpolated values are rounded
			return &MaterialError{fmt.Sprintf("yield stress at plastic strain %v", h.strain[i]), to, temperature,
				fmt.Sprintf("at least that at the strain before, %v: softening has no unique solution", from)}
		}
		return nil
	}
	if err := before.each(test); err != nil {
		return err
	}
	return after.each(test)
}

// curve is the yield stress over plastic strain at one temperature: Voce's with a linear part, or a table.
type curve struct {
	yield, modulus, saturation, rate             float64 // σ₀, H, Q, b
	yieldByT, modulusByT, saturationByT, rateByT float64
	table                                        []Table // instead of H, Q and b; yield is then only NaN or not
	strains                                      []float64
	temperature                                  float64
}

func (h LinearHardening) at(temperature float64) (c curve) {
	c.yield, c.yieldByT = h.Yield.At(temperature)
	c.modulus, c.modulusByT = h.Modulus.At(temperature)
	if math.IsNaN(c.modulus) {
		c.yield = c.modulus
	}
	return c
}

func (h VoceHardening) at(temperature float64) (c curve) {
	c.yield, c.yieldByT = h.Yield.At(temperature)
	c.modulus, c.modulusByT = h.Modulus.At(temperature)
	c.saturation, c.saturationByT = h.Saturation.At(temperature)
	c.rate, c.rateByT = h.Rate.At(temperature)
	if sum := c.modulus + c.saturation + c.rate; math.IsNaN(sum) {
		c.yield = sum
	}
	return c
}

func (h TabulatedHardening) at(temperature float64) curve {
	c := curve{table: h.yield, strains: h.strain, temperature: temperature}
	if !(temperature >= h.lowest && temperature <= h.highest) {
		c.yield = math.NaN()
	}
	return c
}

// stress is the yield stress with its derivatives by plastic strain and by temperature.
func (c *curve) stress(strain float64) (value, byStrain, byT float64) {
	switch {
	case math.IsNaN(c.yield) || !(strain >= 0):
		nan := math.NaN()
		return nan, nan, nan
	case c.table != nil:
		l := c.line(c.segment(strain))
		past := strain - l.from
		return l.value + l.slope*past, l.slope, l.valueByT + l.slopeByT*past
	}
	value, byStrain = c.yield+c.modulus*strain, c.modulus
	byT = c.yieldByT + c.modulusByT*strain
	if c.saturation == 0 && c.saturationByT == 0 {
		return value, byStrain, byT
	}
	gone, left := -math.Expm1(-c.rate*strain), math.Exp(-c.rate*strain)
	value += c.saturation * gone
	byStrain += c.saturation * c.rate * left
	byT += c.saturationByT*gone + c.saturation*left*strain*c.rateByT
	return value, byStrain, byT
}

// line is a straight part of a tabulated curve.
type line struct {
	from, to           float64 // plastic strains, +Inf behind the last part
	value, slope       float64 // at from; dσy/dκ
	valueByT, slopeByT float64
}

// segment is the index of the line that goes up from a strain.
func (c *curve) segment(strain float64) int {
	return sort.Search(len(c.strains)-1, func(i int) bool { return c.strains[i+1] > strain })
}

func (c *curve) line(i int) line {
	l := line{from: c.strains[i], to: math.Inf(1)}
	l.value, l.valueByT = c.table[i].At(c.temperature)
	if i+1 < len(c.strains) {
		l.to = c.strains[i+1]
		next, nextByT := c.table[i+1].At(c.temperature)
		perStrain := 1 / (l.to - l.from)
		l.slope, l.slopeByT = math.Max(0, next-l.value)*perStrain, (nextByT-l.valueByT)*perStrain
	}
	return l
}
