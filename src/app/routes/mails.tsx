export function Component() {
  return <h1>mails</h1>;
}
