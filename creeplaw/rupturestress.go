package creeplaw

import "math"

// RuptureStress is the stress that drives damage under multiaxial stress, after Hayhurst,
//
//	σr = α σ1 + 3β σm + (1-α-β) σ
//
// Symbols: σ1 greatest principal stress, σm mean stress, σ von Mises stress [stress]; α Principal and β Mean [-], with
// α, β ≥ 0 and α + β ≤ 1. In tension σr is the stress whatever α and β. With β = 0 it is the form of Sdobyrev, a blend of
// greatest principal and von Mises stress. The zero RuptureStress is the von Mises stress.
//
// Copper follows the greatest principal stress (α near 1), aluminium the von Mises stress (α near 0). Where σr is not
// positive, as under compression with α = 1, damage does not grow.
//
// Source: D. R. Hayhurst, J. Mech. Phys. Solids 20 (1972) 381–390 (from memory).
type RuptureStress struct {
	Principal float64 // α
	Mean      float64 // β
}

// At returns σr for a von Mises stress σ, a mean stress σm and a greatest principal stress σ1 [stress].
func (r RuptureStress) At(mises, mean, principal float64) float64 {
	s := (1 - r.Principal - r.Mean) * mises
	if r.Mean != 0 {
		s += 3 * r.Mean * mean
	}
	if r.Principal != 0 { // a law that does not see the principal stress is given NaN
		s += r.Principal * principal
	}
	return s
}

// isMises reports whether σr is the von Mises stress.
func (r RuptureStress) isMises() bool { return r.Principal == 0 && r.Mean == 0 }

func (r RuptureStress) check(law string) error {
	switch {
	case !(r.Principal >= 0 && r.Principal <= 1):
		return &ParameterError{law, "share of the greatest principal stress in the rupture stress", r.Principal, "from 0 to 1"}
	case !(r.Mean >= 0 && r.Mean <= 1-r.Principal):
		return &ParameterError{law, "share of the mean stress in the rupture stress", r.Mean,
			"at least 0 and, with that of the greatest principal stress, at most 1"}
	}
	return nil
}

// logAt is ln(σr/reference) and its partial derivatives by ln σ, σm and σ1; -Inf and zeros where σr is not positive.
func (r RuptureStress) logAt(p *EvolvingPoint, reference float64) (value float64, by Partials) {
	s := r.At(p.Stress, p.MeanStress, p.PrincipalStress)
	if s <= 0 {
		return math.Inf(-1), by
	}
	by.ByLogStress = (1 - r.Principal - r.Mean) * (p.Stress / s)
	by.ByMeanStress = 3 * r.Mean / s
	by.ByPrincipalStress = r.Principal / s
	return math.Log(s / reference), by
}
