export { StageRequirements, type StageRequirementsInput } from './stageRequirements'
