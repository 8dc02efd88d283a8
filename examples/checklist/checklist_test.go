package checklist_test

import (
	"math"
	"os"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/examples/checklist"
)

func TestPassed(t *testing.T) {
	assert.False(t, checklist.Check{Value: math.NaN(), Limit: 1}.Passed())
	assert.False(t, checklist.Check{Value: math.NaN(), Limit: 1, AtLeast: true}.Passed())
	assert.False(t, checklist.Check{Value: 2, Limit: 1}.Passed())
	assert.False(t, checklist.Check{Value: 1, Limit: 2, AtLeast: true}.Passed())
	var l checklist.List
	l.AtMost("error", 1, 1)
	l.AtLeast("order", 2, 1.8)
	assert.True(t, l.Passed())
	l.AtMost("missing", math.NaN(), 1)
	assert.False(t, l.Passed())
}

func ExampleList_Write() {
	var l checklist.List
	l.AtMost("error", 3e-8, 1e-3)
	l.AtLeast("order of the error", 0.9, 1.8)
	l.Write(os.Stdout)
	// Output:
	//
	// WHAT WAS CHECKED              value     limit
	//    pass  error                3e-08     ≤ 0.001
	//    FAIL  order of the error   0.9       ≥ 1.8
}
