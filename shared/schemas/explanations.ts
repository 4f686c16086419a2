import { z } from 'zod'

/** What opens an explanation besides its link: the patient's date of birth. */
export const explanationSchema = z.strictObject({
  birthDate: z.iso.date({ error: 'Give your date of birth: month, day and year.' }),
})

const whole = (text: string) => /^\d+$/.test(text.trim()) ? Number(text.trim()) : Number.NaN

/** The same as a plain form sends it, in three fields. A day that the month does not have is refused. */
export const explanationFormSchema = z.object({ month: z.string(), day: z.string(), year: z.string() })
  .transform(({ month, day, year }) => {
    const pad = (value: number, length: number) => String(value).padStart(length, '0')
    return { birthDate: `${pad(whole(year), 4)}-${pad(whole(month), 2)}-${pad(whole(day), 2)}` }
  })
  .pipe(explanationSchema)
