package tensor_test

import (
	"errors"
	"strings"
	"testing"

	"example.com/holdtime/tensor"
)

// FuzzNewLayout: any text gives a layout that does what its words say, or an error that points at one of them.
func FuzzNewLayout(f *testing.F) {
	for _, c := range hostLayouts {
		f.Add(c.components, uint8(tensor.EngineeringShear))
	}
	f.Fuzz(func(t *testing.T, components string, shear uint8) {
		words := strings.Fields(components)
		l, err := tensor.NewLayout(components, tensor.Shear(shear))
		if err != nil {
			var e *tensor.LayoutError
			if !errors.As(err, &e) || e.Components != components || e.Reason == "" || l != (tensor.Layout{}) {
				t.Fatalf("%q, %d: %v with error %#v", components, shear, l, err)
			}
			if e.Position != 0 && words[e.Position-1] != e.Word {
				t.Fatalf("%q: component %d is not %q", components, e.Position, e.Word)
			}
			return
		}
		if l.Len() != len(words) || l.Len() < 1 || l.Len() > 6 {
			t.Fatalf("%q: %d components", components, l.Len())
		}
		host := []float64{1, 2, 3, 4, 5, 6}[:l.Len()]
		if seen := l.StressIn(host); seen.Dot(tensor.Identity())+seen[yz]+seen[xz]+seen[xy] != float64(l.Len()*(l.Len()+1)/2) {
			t.Fatalf("%q: two words share a component: %v", components, seen)
		}
		again, err := tensor.NewLayout(l.Components(), l.Shear())
		if err != nil || again != l {
			t.Fatalf("%q: rebuilt from %q: %v, %v", components, l.Components(), again, err)
		}
		reading := strings.NewReplacer("r", "x", "t", "y") // each word, read letter by letter, is the component or its mirror
		for i, name := range strings.Fields(l.Components()) {
			word := reading.Replace(words[i])
			if word != name && word != string([]byte{name[1], name[0]}) {
				t.Fatalf("%q: %q became %q", components, words[i], name)
			}
		}
	})
}
