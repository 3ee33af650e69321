/** Why the command line stops with exit code 2: one sentence, for stderr. */
export class Refusal extends Error {}
