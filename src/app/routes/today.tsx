export function Component() {
  return <h1>today</h1>;
}
