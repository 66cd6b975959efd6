import type { ModelEntry, ModelRange } from './model-entry.ts'

const lifetime: ModelRange = { input: 'lifetime', low: 1e-10, high: 1e-3, unit: 's' }
const slope: ModelRange = { input: 'slope', low: 1e5, high: 1e11, unit: 'A/s' }
const tailRatio: ModelRange = { input: 'tailTime/lifetime', low: 0, high: 1, unit: '1' }
const softness: ModelRange = { input: 'softness', low: 0, high: null, unit: '1' }
const lauritzenMa = 'P. O. Lauritzen & C. L. Ma, IEEE Trans. Power Electronics 6(2), 1991, 188-191'

/** Methods that say how much charge comes back and when. */
export const recoveryModels: readonly ModelEntry[] = [
  {
    id: 'lauritzen-ma-1991',
    file: 'charge-control.ts',
    functions: ['timeToPeak', 'recoveredCharge', 'rampRecovery'],
    equation:
      'ta = (tau − tau_rr)(1 − exp(−T1/tau)(1 + (tau I − q0)/(a tau²))), T1 = I/a + ta; Qrr = a ta (ta/2 + tau_rr)',
    validity: [slope, lifetime, tailRatio],
    source: `${lauritzenMa}; ramp equations from memory, verified against an ODE`,
    bias: 'one lumped charge and an exponential tail: snap-off and the slow end of very soft parts are not in it',
  },
  {
    id: 'lauritzen-ma-1991-conduction',
    file: 'charge-control.ts',
    functions: ['chargeAtTurnOff'],
    equation: 'q0 = tau [(I + m tau) − (Ipk + m tau) exp(−t_on/tau)], m = (Ipk − I)/t_on',
    validity: [lifetime],
    source: `${lauritzenMa}; solution own, verified against an ODE`,
    bias: 'forward recovery during the build-up is not in it',
  },
  {
    id: 'lauritzen-ma-1991-residue',
    file: 'residual-recovery.ts',
    functions: ['residualRecovery'],
    equation: 't_i ≤ ta,s: ramp from −m t_i with the charge left; later I_RM = m ta,s exp(−(t_i − ta,s)/tau_rr)',
    validity: [slope, lifetime, tailRatio],
    source: `${lauritzenMa}; extension to an idle time own, verified against an ODE`,
    bias: 'ringing of the node while the inductor idles is not in it',
  },
  {
    id: 'iec-60747-2',
    file: 'charge-control.ts',
    functions: ['recoveryTimeFactor'],
    equation: 'trr = ta + k tau_rr',
    validity: [],
    source: 'IEC 60747-2, definitions of the reverse recovery time by line and by level; values follow from the tail',
    bias: 'exact for an exponential tail only',
  },
  {
    id: 'lauritzen-ma-1991-step',
    file: 'step-fixture.ts',
    functions: ['stepStorageTime', 'stepRecoveryTime', 'lifetimeFromStep'],
    equation: 'ts = tau ln((I_F + I_R)/(I_R (1 + TM/tau))), trr = ts + tau_rr ln(I_R/I_x)',
    validity: [lifetime, tailRatio],
    source: `${lauritzenMa}; solution own`,
    bias: 'lumped charge: diffusion gives lifetimes 3 to 4.5 times longer for the same storage time',
  },
  {
    id: 'streetman-storage',
    file: 'step-fixture.ts',
    functions: ['simplestStorageTime', 'simplestLifetime'],
    equation: 'ts = tau ln(1 + I_F/I_R)',
    validity: [lifetime],
    source: 'B. G. Streetman & S. Banerjee, Solid State Electronic Devices, problem 5.5 in a published solution',
    bias: 'no tail: storage comes out too long',
  },
  {
    id: 'kingston-1954',
    file: 'diffusion-storage.ts',
    functions: ['diffusionStorageTime', 'diffusionLifetime'],
    equation: 'erf(sqrt(ts/tau)) = I_F/(I_F + I_R)',
    validity: [lifetime],
    source: 'R. H. Kingston, Proc. IRE 42, 1954, 829-834, from memory',
    bias: 'long base; a short base stores less',
  },
  {
    id: 'mohan-triangle',
    file: 'triangle.ts',
    functions: ['triangleFromTime', 'triangleFromCharge'],
    equation: 'ta = trr/(1 + S), I_RM = a ta, Qrr = I_RM trr/2',
    validity: [slope, softness],
    source: 'N. Mohan, T. M. Undeland & W. P. Robbins, Power Electronics, from memory',
    bias: 'printed charges lie up to 15 % off their own triangle',
  },
]
