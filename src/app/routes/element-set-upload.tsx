export function Component() {
  return <h1>element-set-upload</h1>;
}
