// Package ui and the packages below it are everything a person touches: the
// screen, the command line, figures and files. Physics is below, in koehler,
// solutes and atmos, which know nothing of ui.
package ui
