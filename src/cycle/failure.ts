/** Why a machine has no steady state, in figures that the user can act on. */
export class NoSteadyState extends Error {
  override readonly name = "NoSteadyState";

  /**
   * @param block the block whose balance cannot be met, or null where it is the whole machine's
   * @param quantity what is out of reach: "heat", "temperature"
   * @param reason one sentence with the figures
   * @param advice what to change, one sentence
   */
  constructor(
    readonly block: string | null,
    readonly quantity: string,
    readonly reason: string,
    readonly advice: string,
  ) {
    super(`${block === null ? "" : `${block}: `}${reason} ${advice}`);
  }
}
