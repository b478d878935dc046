import { MaterialsScreen } from '../../components/materials/materials-screen';

export default MaterialsScreen;
