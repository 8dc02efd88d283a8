package integrate

import "example.com/holdtime/tensor"

// Values returns what would have to be prescribed for a control to hold a stress and strain as they are: per component the
// strain, the stress, or the value of its relation.
func (c Control) Values(stress, strain tensor.Sym) (prescribed tensor.Sym) {
	for i := range prescribed {
		k := &c.component[i]
		v := strain[i] + k.compliance*stress[i]
		if k.stress {
			v = stress[i]
		}
		prescribed[i] = v / k.unit()
	}
	return prescribed
}
