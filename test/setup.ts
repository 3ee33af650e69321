// Property tests are the same in every run; SEED=… tries others.
import fc from "fast-check";

fc.configureGlobal({ seed: Number(process.env["SEED"] ?? 20261) });
