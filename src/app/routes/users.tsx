export function Component() {
  return <h1>users</h1>;
}
