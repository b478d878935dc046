import { TodayScreen } from '../../components/today/today-screen';

export default TodayScreen;
