import { ModelsScreen } from '../../../components/models/models-screen';

export default ModelsScreen;
