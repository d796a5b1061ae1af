export function Component() {
  return <h1>sign-off</h1>;
}
