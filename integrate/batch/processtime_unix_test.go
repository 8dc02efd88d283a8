//go:build unix

package batch_test

import "syscall"

// processTime is the processor time [s] that all threads have spent.
func processTime() float64 {
	var u syscall.Rusage
	if err := syscall.Getrusage(syscall.RUSAGE_SELF, &u); err != nil {
		return 0
	}
	return float64(u.Utime.Nano()+u.Stime.Nano()) * 1e-9
}
