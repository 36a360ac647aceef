/** What keeps a style from being drafted, and where. */
export interface StyleProblem {
  readonly at?: string | undefined
  readonly message: string
  readonly todo?: string | undefined
}

const sentence = ({ message, todo }: StyleProblem): string => (todo ? `${message} ${todo}` : message)

/** The words of a problem at one place of the style; undefined where it is of another. */
export const errorOfStyle = (problem: StyleProblem | null | undefined, at: string): string | undefined =>
  problem && at !== '' && problem.at === `style.${at}` ? sentence(problem) : undefined

/** A problem of the style whose own field is not on the form: of a group, or of what is not shown. */
export const errorWithin = (problem: StyleProblem | null | undefined, group: string): string | undefined =>
  problem?.at && (problem.at === `style.${group}` || problem.at.startsWith(`style.${group}.`)) ? sentence(problem) : undefined
