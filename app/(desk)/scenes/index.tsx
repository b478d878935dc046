import { ScenesScreen } from '../../../components/scenes/scenes-screen';

export default ScenesScreen;
