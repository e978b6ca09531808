/** Properties draw other cases on every run, so that they go on searching; a failure prints its seed. CI must repeat. */
if (process.env["CI"]) {
  const { configureGlobal } = await import("fast-check");
  configureGlobal({ seed: 20_250_601 });
}
