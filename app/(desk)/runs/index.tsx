import { RunsScreen } from '../../../components/runs/runs-screen';

export default RunsScreen;
