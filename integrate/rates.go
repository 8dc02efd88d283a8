package integrate

import (
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate/internal/dirk"
	"example.com/holdtime/tensor"
)

const (
	stages    = dirk.Stages
	order     = dirk.Order
	diagonal  = dirk.Diagonal
	variables = creeplaw.MaxVariables
)

// rates are the time derivatives of a state.
type rates struct {
	creep      tensor.Sym
	equivalent float64
	internal   [variables]float64
}

// add adds h·f to a state with the given number of internal variables.
func (s *State) add(h float64, f *rates, count int) {
	c := &s.Creep
	c[0] += h * f.creep[0]
	c[1] += h * f.creep[1]
	c[2] += h * f.creep[2]
	c[3] += h * f.creep[3]
	c[4] += h * f.creep[4]
	c[5] += h * f.creep[5]
	s.Equivalent += h * f.equivalent
	for i := range count {
		s.Internal[i] += h * f.internal[i]
	}
}
