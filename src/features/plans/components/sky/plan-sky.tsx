export function PlanSky() {
  return null;
}
