/** Who asks, as far as features need to know. */
export interface Principal {
  readonly memberId: string;
  readonly name: string;
  readonly role: 'member' | 'reviewer' | 'administrator';
  readonly scopes: readonly Scope[];
}

export type Scope = 'read' | 'publish' | 'withdraw';
