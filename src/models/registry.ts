import type { ModelEntry } from './model-entry.ts'
import { energyModels } from './registry-energy.ts'
import { operationModels } from './registry-operation.ts'
import { recoveryModels } from './registry-recovery.ts'

/** Every method of this folder; a test holds that each has a published case or a written reason. */
export const models: readonly ModelEntry[] = [...recoveryModels, ...energyModels, ...operationModels]
