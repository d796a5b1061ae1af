export function Component() {
  return <h1>plans</h1>;
}
