package solutes

// Ion holds the ion-interaction parameters of one salt.
type Ion struct{}

// Concentrated holds a published polynomial valid into supersaturation.
type Concentrated struct{}
