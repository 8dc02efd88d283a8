package main

import "strings"

const helpText = `choose audits every creep law of the catalogue, prints a table to compare them by, and draws the creep curve at constant
stress and the rate over stress of each.

usage: choose [flags]

The laws of the catalogue are given the invented numbers of one steel: each has about one per cent of creep strain after
10 000 h at 100 MPa and 600 °C. -stress and -temperature set the condition of the creep curves; the audit covers half a decade
of stress and eight per cent of absolute temperature to either side. The sets of package published come with their own numbers,
each over the range it is known for. The table says what its columns mean. -report writes every audit in full, to paste into a
document. Pictures: choose.png and published.png, and the same as .svg. "(!)" marks a law with a fault.

The exit status is 1 when something could not be computed or written, 2 for a wrong flag and 0 otherwise: faults of laws are what
the program is for.

` + caution + `

flags:
`

const caution = `The numbers of the steel are invented, published numbers are starting points, never design data. An audit says whether a law is
consistent, not whether it is right: parts are designed and assessed to the governing code by qualified engineers.`

var rule = strings.Repeat("-", 78)
