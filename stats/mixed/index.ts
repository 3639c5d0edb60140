export { fitProfileModel, type ProfileModel, type ProfileModelOptions } from './profile-model';
export {
  contrast,
  marginalMeans,
  modelComparisons,
  productTest,
  type Contrast,
  type DfMethod,
  type MarginalMean,
  type ModelPair,
  type ProductTest,
} from './contrasts';
