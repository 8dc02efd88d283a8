package batch_test

import (
	"context"
	"runtime"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/integrate/batch"
	"example.com/holdtime/tensor"
)

// TestBytesDoNotGrow: what a call allocates does not depend on the number of points: to the byte for one worker, and within the
// same bound, which a number for each point would exceed, for several. There it varies from call to call, because the runtime may
// make a goroutine anew, and with which workers meet failures.
func TestBytesDoNotGrow(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	spoiled := h.outputs(h.draw(10000), true)
	sound := h.outputs(h.sound(h.draw(10000)), true)
	for _, workers := range []int{1, 4} {
		b := h.batch(t, batch.Options{Workers: workers})
		for _, derivatives := range []bool{true, false} {
			for _, p := range []batch.Points{spoiled, sound} {
				if !derivatives {
					p.Tangent, p.ByTemperature = nil, nil
				}
				few, many := h.allocated(b, h.slice(p, 0, 1000)), h.allocated(b, p)
				failures := b.Step(context.Background(), p) != nil
				t.Logf("%d workers, derivatives %v, failures %v: {bytes count} %v for 1000 points, %v for 10000", workers, derivatives,
					failures, few, many)
				if workers == 1 {
					require.Equal(t, few, many)
				}
				require.LessOrEqual(t, max(few.bytes, many.bytes), bound(workers, failures))
			}
		}
	}
}

// bound is a few hundred bytes for each worker and as much for its goroutine; with failures, for each worker and for the report
// 256 counts and a list of 16.
func bound(workers int, failures bool) uint64 {
	most := 900 * workers
	if failures {
		most += (workers + 1) * (256*8 + 2*16*16)
	}
	return uint64(most)
}

// allocated is what a call allocated.
type allocated struct{ bytes, count uint64 }

// allocated is the least of several calls: the runtime allocates on its own account, too.
func (h *plant) allocated(b *batch.Batch, p batch.Points) allocated {
	least := allocated{1 << 60, 1 << 60}
	for range 10 {
		var before, after runtime.MemStats
		runtime.ReadMemStats(&before)
		_ = b.Step(context.Background(), p)
		runtime.ReadMemStats(&after)
		least.bytes = min(least.bytes, after.TotalAlloc-before.TotalAlloc)
		least.count = min(least.count, after.Mallocs-before.Mallocs)
	}
	return least
}
