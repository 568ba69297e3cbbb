const LEVELS = 9;
const STEP_X = 52;
const STEP_Y = 84;
const WATER_Y = 790;

/** A stair down to still water. The one picture without data; its colours are the same by day and by night. */
export function SignInPicture({ className }: { className?: string }) {
  return (
    <svg viewBox="0 0 920 900" preserveAspectRatio="xMidYMid slice" aria-hidden="true" className={className}>
      {Array.from({ length: LEVELS }, (_, level) => (
        <path
          key={level}
          d={`M${level * STEP_X} ${level * STEP_Y}H${920 - level * STEP_X}V900H${level * STEP_X}Z`}
          fill={`color-mix(in srgb, #0b6670 ${level * 10}%, #1b2627)`}
        />
      ))}
      <path d={`M0 ${WATER_Y}H920V900H0Z`} fill="#67c9c5" opacity="0.16" />
      <path d={`M0 ${WATER_Y}H920`} stroke="#67c9c5" strokeWidth="3" />
    </svg>
  );
}
