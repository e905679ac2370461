import fc from 'fast-check'

/**
 * The seed of every property. It is one and the same for everyone, so that a check that passed here passes there;
 * SEED=123 tries another, and the long runs (SOAK=1) a new one each time. A failure names its seed.
 */
export const seed = Number(process.env.SEED ?? (process.env.SOAK ? Date.now() % 1e9 : 20_261_201))

fc.configureGlobal({ seed })
