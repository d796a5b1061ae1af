export function PlanMap() {
  return null;
}
