/** A symbol as it is written by hand: `M_V` with the V below the line. Text without an underscore stays as it is. */
export function Subscripted({ text }: { text: string }) {
  const parts = /^(.*?)_(\w+)(.*)$/.exec(text)
  if (!parts) return text
  return (
    <>
      {parts[1]}
      <sub>{parts[2]}</sub>
      {parts[3]}
    </>
  )
}
