export function Component() {
  return <h1>satellites</h1>;
}
