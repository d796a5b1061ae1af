export function Component() {
  return <h1>plan</h1>;
}
