import { ProofScreen } from '../../components/proof/proof-screen';

export default ProofScreen;
