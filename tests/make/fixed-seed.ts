import fc from 'fast-check';

/** The same cases at each run, so that a red build can be made red again; `FC_SEED=<number> npm test -- unit` tries others. */
fc.configureGlobal({ seed: Number(process.env.FC_SEED ?? 20261201) });
