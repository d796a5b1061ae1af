// Stands in for satellite.js's WebAssembly builds (see vite.config.ts); nothing imports it by name.
export default {};
