package verify

import "fmt"

// Check recomputes one published value. The result is in SI units (fractions
// for percent); Run converts it to the unit of the row.
type Check func(Args) (float64, error)

// Checks returns the registry: every check key with its function.
func Checks() map[string]Check {
	all := map[string]Check{}
	for _, part := range []map[string]Check{waterChecks(), solutesChecks(), acidsChecks(), koehlerChecks(), lineChecks()} {
		for key, check := range part {
			if _, twice := all[key]; twice {
				panic(fmt.Sprintf("verify: check %q is registered twice", key))
			}
			all[key] = check
		}
	}
	return all
}
