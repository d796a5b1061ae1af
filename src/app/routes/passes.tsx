export function Component() {
  return <h1>passes</h1>;
}
