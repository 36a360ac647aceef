import fc from 'fast-check'

/** The same generated input at every run, so that a change is judged and not chance; TENTERFRAME_SEED looks elsewhere. */
fc.configureGlobal({ seed: Number(process.env.TENTERFRAME_SEED ?? 20_261_201) })
