export function Component() {
  return <h1>element-sets</h1>;
}
