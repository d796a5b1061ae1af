export function Component() {
  return <h1>mission</h1>;
}
