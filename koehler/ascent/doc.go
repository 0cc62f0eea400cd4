// Package ascent is about air that rises: which supersaturation it reaches and how
// many droplets form.
//
// Run follows a closed adiabatic parcel with a population of particles, each size
// growing by vapour (no collisions, fall-out, entrainment or ventilation):
//
//	dz/dt = w
//	dp/dt = -g p w/(R_d T_v)
//	dT/dt = -g w/c_p + (L/c_p) dw_l/dt
//	r dr/dt = (S - S_eq(r))/F
//	F = ρ_w R T/(e_s D_v* M_w) + (L ρ_w/(k_a* T)) (L M_w/(R T) - 1)
//
// with the vapour w_v from total water, so that water is conserved identically. D_v*
// and k_a* are corrected for the transition to free molecules (Transition). The
// density of liquid water is that of the start throughout. Properties are those of
// package atmos, the latent heat in its linear form, which agrees with a constant
// heat capacity (Kirchhoff).
//
// Beside it stand closed forms (Twomey 1959, Abdul-Razzak & Ghan 2000, Fountoukis &
// Nenes 2005), a distribution of updrafts, sensitivities, the regime of Reutter et
// al. 2009, and sweeps over two quantities.
//
// Everything is in SI units; concentrations are in 1/m³ of the air at the start
// unless a name says otherwise. Nothing prints or reads files; a run is stopped by
// its context. All functions are safe for concurrent use.
package ascent
