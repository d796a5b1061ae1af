export function Component() {
  return <h1>stations</h1>;
}
