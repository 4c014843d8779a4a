/** Seven thin waves under the plate: ornament. */
export function Guilloche() {
  const waves = Array.from({ length: 7 }, (_, wave) => {
    const points = Array.from({ length: 121 }, (_, step) => {
      const x = step * 10;
      const y = 4.5 + 3.4 * Math.sin(step / (3 + wave * 0.55) + wave * 0.9) * Math.cos(step / 17 + wave);
      return `${x} ${y.toFixed(2)}`;
    });
    return `M${points.join('L')}`;
  });
  return (
    <svg className="guilloche" viewBox="0 0 1200 9" preserveAspectRatio="none" aria-hidden="true">
      {waves.map((wave) => (
        <path key={wave} d={wave} fill="none" stroke="currentColor" strokeWidth="0.5" />
      ))}
    </svg>
  );
}
