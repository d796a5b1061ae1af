export function Component() {
  return <h1>not-found</h1>;
}
