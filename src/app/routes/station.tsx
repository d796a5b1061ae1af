export function Component() {
  return <h1>station</h1>;
}
