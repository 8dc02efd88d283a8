package curve

import "example.com/holdtime/creeplaw"

var _ creeplaw.Parametric = StrainHardened{}

// Parameters returns the numbers the curve was built from, "steady rate: prefactor" and the like; none for a curve of the
// user's.
func (h StrainHardened) Parameters() []creeplaw.Parameter {
	r, _ := RecipeOf(h.curve)
	return r.Parameters()
}

// WithParameters makes the law of the same kind of curve from other numbers. A fault is a *creeplaw.ParameterError.
func (h StrainHardened) WithParameters(values []float64) (creeplaw.Law, error) {
	r, ok := RecipeOf(h.curve)
	switch {
	case !ok && len(values) == 0 && h.curve != nil:
		return h, nil
	case !ok:
		return nil, wrongNumber("strain-hardened curve", len(values))
	}
	other, err := r.WithParameters(values)
	if err != nil {
		return nil, err
	}
	c, err := other.Make()
	if err != nil {
		return nil, err
	}
	law, err := NewStrainHardened(c)
	if err != nil {
		return nil, err
	}
	return law, nil
}
