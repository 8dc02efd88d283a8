// Package tensor holds symmetric 3-D tensors and the layouts in which host codes store them.
package tensor
