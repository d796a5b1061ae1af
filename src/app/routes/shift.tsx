export function Component() {
  return <h1>shift</h1>;
}
