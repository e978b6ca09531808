import fc from "fast-check";

/** Properties draw other cases on every run, so that they go on searching; a failure prints its seed. CI must repeat. */
if (process.env["CI"]) fc.configureGlobal({ seed: 20_250_601 });
