export function Component() {
  return <h1>missions</h1>;
}
