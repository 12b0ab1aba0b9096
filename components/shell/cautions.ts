/** What stands wherever the work can hurt someone; the words are fixed here so that no page softens them. */
export const CAUTIONS = {
  water:
    "Open-water foiling can kill. Buoyancy aid, leash, helmet, a partner, a way to call for help, local rules and the forecast come first. Trimwake is neither a navigation aid nor a safety service.",
  trim: "Trim and lift figures are estimates from simple theory. Change one step at a time, in easy conditions, and follow the maker’s limits and bolt torques.",
  speed: "A GPS speed is a measurement with an error: figures carry the recording rate and a quality grade.",
} as const;
