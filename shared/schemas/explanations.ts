import { z } from 'zod'

/** What opens an explanation besides its link: the patient's date of birth. */
export const explanationSchema = z.strictObject({
  birthDate: z.iso.date({ error: 'Give your date of birth: month, day and year.' }),
})

const whole = (text: string) => /^\d+$/.test(text.trim()) ? Number(text.trim()) : Number.NaN

/** The same as a plain form sends it, in three fields. A day that the month does not have is refused. */
export const explanationFormSchema = z.object({ month: z.string(), day: z.string(), year: z.string() })
  .transform(({ month, day, year }) => {
    const two = (value: number) => String(value).padStart(2, '0')
    return { birthDate: `${whole(year)}-${two(whole(month))}-${two(whole(day))}` }
  })
  .pipe(explanationSchema)
