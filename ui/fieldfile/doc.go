// Package fieldfile reads and writes measured files: CSV (RFC 4180), ICARTT V2
// (FFI 1001) and NASA Ames 1001 with the flags of EBAS.
//
// Open recognises the format, reads the header and guesses what each column
// holds. The guess can be shown (File.Mapping) and changed (File.Use). Then there
// are three ways to go on, each streaming at constant memory:
//
//	File.Read      one record: a cell a column, in SI units
//	Samples.Next   one sample: sizes, counts and single values, wide or long layout
//	Merger.Next    several files on one time axis
//
// A cell keeps four states: a value, missing, below and above the limit of
// detection. Nothing here judges a measurement; only what a file itself says
// (missing codes, flags) makes a cell missing, and that is counted.
//
// The CSV reader works on bytes: the same job on encoding/csv takes about twice
// as long and allocates for every record, and encoding/csv sets no bound to the
// length of a record. The benchmarks compare both.
package fieldfile
