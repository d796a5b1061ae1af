export function Component() {
  return <h1>satellite</h1>;
}
