import type { System } from "./draft";

/** Work that local rules keep for people with a licence of their own: the page says so before the first step. */
const KEPT: Readonly<Partial<Record<System, string>>> = {
  "high-voltage": "High-voltage work",
  restraint: "Work on airbags and seat-belt tensioners",
  "air-conditioning": "Work on the refrigerant circuit",
  fuel: "Work on gas and pressurised fuel",
};

/** The sentence for a lesson of this system; "" where local rules usually ask for nothing. */
export function localRulesWords(system: string): string {
  const work = KEPT[system as System];
  return work === undefined
    ? ""
    : `${work} is for people who hold the licence or training that your local rules ask for. Follow the vehicle maker's procedure.`;
}
