package position_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/examples/position"
)

func TestFault(t *testing.T) {
	s := position.NewSource("file", []byte("\uFEFFa\tb\n°C, x\n"))
	for _, c := range []struct {
		offset int
		where  string
	}{{-1, "1:1"}, {0, "1:1"}, {2, "1:3"}, {3, "1:4"}, {4, "2:1"}, {6, "2:2"}, {9, "2:5"}, {11, "3:1"}, {99, "3:1"}} {
		assert.EqualError(t, s.Fault(c.offset, "%s is wrong", "x"), "file:"+c.where+": x is wrong", "offset %d", c.offset)
	}
	assert.Equal(t, &position.Error{File: "file", Place: position.Place{Line: 4, Column: 7}, Text: "100 %"},
		s.FaultAt(position.Place{Line: 4, Column: 7}, "100 %%"))
}
