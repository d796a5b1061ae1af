export function Component() {
  return <h1>audit</h1>;
}
