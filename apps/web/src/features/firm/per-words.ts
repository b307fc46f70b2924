/** The lengths that ohms are given per. */
export const PER_WORDS = { '1000ft': 'Ω per 1000 ft', km: 'Ω per km' } as const;
